import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { replayDelivery } from "@/lib/webhooks"
import {
  deliveryId,
  exampleDelivery,
  queuedDelivery,
  showDeliveryAs,
  shownDelivery,
} from "../../../../shown-delivery"
import { endpointId } from "../../../../shown-endpoint"

export const replayWebhookDelivery = defineOperation({
  id: "replayWebhookDelivery",
  method: "POST",
  path: "/webhooks/{endpoint_id}/deliveries/{delivery_id}/replay",
  tag: "Webhooks",
  summary: "Send an event once more",
  description:
    "A new delivery with the same body and the same `webhook-id`, by which your receiver knows what it had before.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  status: 201,
  stores: true,
  request: z.strictObject({ endpoint_id: endpointId, delivery_id: deliveryId }),
  response: shownDelivery,
  problems: ["conflict"],
  example: {
    request: { endpoint_id: exampleDelivery.endpoint_id, delivery_id: exampleDelivery.id },
    response: { ...queuedDelivery, id: "dlv_01kbc0y2a4e8xbm7r5s9d6k1qw" },
  },
  async run({ input, caller: { ctx } }) {
    return showDeliveryAs(await replayDelivery({ ctx, input }))
  },
})
