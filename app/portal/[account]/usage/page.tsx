import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { usageOf } from "@/app/portal/usage-of"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { Usage } from "./usage"

export const metadata: Metadata = { title: "Usage" }

export default async function UsagePage({ params }: OfAccount) {
  const { account, ctx } = await openAccountFor("usage.read", params)
  const initial = await usageOf({ ctx, input: { mode: "live", days: 30, by: "day" } })
  return <Usage account={account.slug} initial={asJson(initial)} />
}
