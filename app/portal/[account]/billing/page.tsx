import type { Metadata } from "next"
import type { OfAccount, WithQuery } from "@/app/page-props"
import { billingOf } from "@/app/portal/billing-of"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { can } from "@/lib/accounts"
import { Billing } from "./billing"

export const metadata: Metadata = { title: "Billing" }

export default async function BillingPage({ params, searchParams }: OfAccount & WithQuery) {
  const { account, actor, ctx } = await openAccountFor("billing.read", params)
  const { checkout } = await searchParams
  return (
    <Billing
      account={account.slug}
      initial={asJson(await billingOf({ ctx }))}
      mayManage={can(actor, "billing.manage")}
      checkout={checkout === "done" || checkout === "left" ? checkout : undefined}
    />
  )
}
