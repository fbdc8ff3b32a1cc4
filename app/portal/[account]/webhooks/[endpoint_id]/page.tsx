import type { Metadata } from "next"
import { notFound } from "next/navigation"
import { newestDeliveries } from "@/app/portal/newest-deliveries"
import { openAccountFor } from "@/app/session"
import { asJson } from "@/app/ui/json"
import { can } from "@/lib/accounts"
import { TarnwrightError } from "@/lib/errors"
import { deliveryFailures, showEndpoint, subscribableEvents, webhookEvents } from "@/lib/webhooks"
import { EndpointView } from "./endpoint-view"

interface OfEndpoint {
  params: Promise<{ account: string; endpoint_id: string }>
}

export const metadata: Metadata = { title: "Webhook endpoint" }

export default async function EndpointPage({ params }: OfEndpoint) {
  const { account, actor, ctx } = await openAccountFor("webhook.read", params)
  const { endpoint_id } = await params
  const input = { endpoint_id }
  const endpoint = await showEndpoint({ ctx, input }).catch((error: unknown): never => {
    if (error instanceof TarnwrightError && error.code === "not_found") notFound()
    throw error
  })
  return (
    <EndpointView
      account={account.slug}
      endpoint={asJson(endpoint)}
      initial={asJson(await newestDeliveries({ ctx, input }))}
      events={subscribableEvents.map((type) => ({ type, summary: webhookEvents[type].summary }))}
      failures={deliveryFailures}
      manages={can(actor, "webhook.manage")}
    />
  )
}
