import type { Metadata } from "next"
import type { OfAccount } from "@/app/page-props"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { can } from "@/lib/accounts"
import { listEndpoints, subscribableEvents, webhookEvents } from "@/lib/webhooks"
import { Webhooks } from "./webhooks"

export const metadata: Metadata = { title: "Webhooks" }

export default async function WebhooksPage({ params }: OfAccount) {
  const { account, actor, ctx } = await openAccountFor("webhook.read", params)
  return (
    <Webhooks
      account={account.slug}
      initial={asJson(await listEndpoints({ ctx }))}
      events={subscribableEvents.map((type) => ({ type, summary: webhookEvents[type].summary }))}
      manages={can(actor, "webhook.manage")}
    />
  )
}
