import { z } from "zod"
import { type Delivery, deliveryFailures } from "@/lib/webhooks"
import { endpointId, exampleEndpoint } from "./shown-endpoint"

export const deliveryId = z
  .string()
  .regex(/^dlv_[0-9a-z]{26}$/, "Send the id of one of your deliveries, as dlv_….")
  .meta({ description: "Id of the delivery" })

const failures = Object.keys(deliveryFailures) as [keyof typeof deliveryFailures]

/** A delivery as the API shows it. */
export const shownDelivery = z
  .object({
    id: deliveryId,
    endpoint_id: endpointId,
    event_id: z.string().meta({ description: "The `webhook-id` that was sent; a repeated event keeps it" }),
    type: z.string(),
    status: z.enum(["pending", "delivered", "failed"]),
    attempts: z.int().meta({ description: "Attempts made", "x-unit": "1" }),
    created_at: z.iso.datetime(),
    next_attempt_at: z.iso.datetime().nullable(),
    last_attempt_at: z.iso.datetime().nullable(),
    last_status: z.int().nullable().meta({ description: "HTTP status of the last answer", "x-unit": "1" }),
    last_failure: z
      .enum(failures)
      .nullable()
      .meta({
        description: Object.entries(deliveryFailures)
          .map(([code, words]) => `\`${code}\`: ${words}.`)
          .join(" "),
      }),
    last_duration_ms: z
      .int()
      .nullable()
      .meta({ description: "Time that the last attempt took", "x-unit": "ms" }),
  })
  .meta({ id: "WebhookDelivery" })

export function showDeliveryAs({ payload: _, ...delivery }: Delivery): z.output<typeof shownDelivery> {
  return {
    ...delivery,
    created_at: delivery.created_at.toISOString(),
    next_attempt_at: delivery.next_attempt_at?.toISOString() ?? null,
    last_attempt_at: delivery.last_attempt_at?.toISOString() ?? null,
  }
}

export const exampleDelivery = {
  id: "dlv_01kbc0x7qzf0ra2w6v8n4m3h5t",
  endpoint_id: exampleEndpoint.id,
  event_id: "evt_01kbc0x7qzf0ra2w6v8n4m3h5t",
  type: "key.revoked",
  status: "pending",
  attempts: 1,
  created_at: "2026-12-01T09:30:00.000Z",
  next_attempt_at: "2026-12-01T09:30:05.300Z",
  last_attempt_at: "2026-12-01T09:30:00.100Z",
  last_status: 503,
  last_failure: "refused",
  last_duration_ms: 84,
} satisfies z.output<typeof shownDelivery>

export const queuedDelivery = {
  ...exampleDelivery,
  attempts: 0,
  next_attempt_at: exampleDelivery.created_at,
  last_attempt_at: null,
  last_status: null,
  last_failure: null,
  last_duration_ms: null,
} satisfies z.output<typeof shownDelivery>
