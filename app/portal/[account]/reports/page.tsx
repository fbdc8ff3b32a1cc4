import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { newestReports } from "@/app/portal/newest-reports"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { can } from "@/lib/accounts"
import { Reports } from "./reports"

export const metadata: Metadata = { title: "Reports" }

export default async function ReportsPage({ params }: OfAccount) {
  const { account, actor, person, ctx } = await openAccountFor("report.read", params)
  return (
    <Reports
      account={account.slug}
      initial={asJson(await newestReports({ ctx }))}
      person={person.id}
      managesAll={can(actor, "report.manage", { by: null })}
    />
  )
}
