import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { insightsOf } from "@/app/portal/insights-of"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { Insights } from "./insights"

export const metadata: Metadata = { title: "Insights" }

export default async function InsightsPage({ params }: OfAccount) {
  const { account, ctx } = await openAccountFor("insight.read", params)
  return <Insights account={account.slug} initial={asJson(await insightsOf({ ctx, input: { days: 90 } }))} />
}
