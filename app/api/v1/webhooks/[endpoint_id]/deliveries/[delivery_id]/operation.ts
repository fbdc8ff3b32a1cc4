import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { showDelivery, webhookEvents } from "@/lib/webhooks"
import { deliveryId, exampleDelivery, showDeliveryAs, shownDelivery } from "../../../shown-delivery"
import { endpointId } from "../../../shown-endpoint"

export const readWebhookDelivery = defineOperation({
  id: "readWebhookDelivery",
  method: "GET",
  path: "/webhooks/{endpoint_id}/deliveries/{delivery_id}",
  tag: "Webhooks",
  summary: "One delivery, with what was sent",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  request: z.strictObject({ endpoint_id: endpointId, delivery_id: deliveryId }),
  response: shownDelivery
    .extend({ payload: z.record(z.string(), z.unknown()).meta({ description: "The body that was sent" }) })
    .meta({ id: "WebhookDeliveryWithPayload" }),
  example: {
    request: { endpoint_id: exampleDelivery.endpoint_id, delivery_id: exampleDelivery.id },
    response: {
      ...exampleDelivery,
      payload: {
        type: "key.revoked",
        timestamp: exampleDelivery.created_at,
        data: webhookEvents["key.revoked"].example,
      },
    },
  },
  async run({ input, caller: { ctx } }) {
    const delivery = await showDelivery({ ctx, input })
    return { ...showDeliveryAs(delivery), payload: JSON.parse(delivery.payload) }
  },
})
