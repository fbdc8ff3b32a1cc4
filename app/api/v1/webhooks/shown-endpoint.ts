import { z } from "zod"
import { type Endpoint, subscribableEvents } from "@/lib/webhooks"

export const endpointId = z
  .string()
  .regex(/^hook_[0-9a-z]{26}$/, "Send the id of one of your endpoints, as hook_….")
  .meta({ description: "Id of the endpoint" })

export const targetUrl = z.string().max(2_000).meta({
  description:
    "Where events are posted: https, port 443 or 8443, a host name whose addresses are all public, no redirects",
})

export const events = z
  .array(z.enum(subscribableEvents))
  .min(1)
  .max(subscribableEvents.length)
  .meta({ description: "Events that are sent there" })

/** An endpoint as the API shows it: never its secret. */
export const shownEndpoint = z
  .object({
    id: endpointId,
    url: z.string(),
    events,
    disabled_at: z.iso
      .datetime()
      .nullable()
      .meta({ description: "Since when nothing is sent; null: it is on" }),
    disabled_reason: z
      .enum(["paused", "gone"])
      .nullable()
      .meta({ description: "`paused` by you; `gone`: it answered 410" }),
    created_at: z.iso.datetime(),
    updated_at: z.iso.datetime(),
  })
  .meta({ id: "WebhookEndpoint" })

export function showEndpointAs({ id, url, events, disabled_reason, ...times }: Endpoint) {
  return {
    id,
    url,
    events,
    disabled_at: times.disabled_at?.toISOString() ?? null,
    disabled_reason,
    created_at: times.created_at.toISOString(),
    updated_at: times.updated_at.toISOString(),
  }
}

export const exampleEndpoint = {
  id: "hook_01kbc0x7qzf0ra2w6v8n4m3h5t",
  url: "https://shop.example/hooks/tarnwright",
  events: ["report.created", "key.revoked"],
  disabled_at: null,
  disabled_reason: null,
  created_at: "2026-12-01T09:00:00.000Z",
  updated_at: "2026-12-01T09:00:00.000Z",
} satisfies z.output<typeof shownEndpoint>
