import type { Metadata } from "next"
import { REPORT_UNITS } from "@/app/api/v1/reports/new-report"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { can } from "@/lib/accounts"
import { Bench } from "./bench"

export const metadata: Metadata = { title: "Bench" }

export default async function BenchPage({ params }: OfAccount) {
  const { account, actor } = await openAccountFor("bench.use", params)
  return (
    <Bench
      account={account.slug}
      shop={account.name}
      may={{ save: can(actor, "report.create"), stock: can(actor, "catalog.manage") }}
      reportUnits={REPORT_UNITS}
    />
  )
}
