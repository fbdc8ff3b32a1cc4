import { z } from "zod"
import { listFields, listOf } from "@/app/api/v1/list-fields"
import { defineOperation } from "@/lib/api/define-operation"
import { pageOf, positionOf } from "@/lib/cursor"
import { DELIVERY_DAYS, listDeliveries } from "@/lib/webhooks"
import { exampleDelivery, showDeliveryAs, shownDelivery } from "../../shown-delivery"
import { endpointId, exampleEndpoint } from "../../shown-endpoint"

export const listWebhookDeliveries = defineOperation({
  id: "listWebhookDeliveries",
  method: "GET",
  path: "/webhooks/{endpoint_id}/deliveries",
  tag: "Webhooks",
  summary: "What was sent to an endpoint",
  description: `Newest first, ${DELIVERY_DAYS} days back, with how the last attempt of each went.`,
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  request: z.strictObject({
    endpoint_id: endpointId,
    status: z.enum(["pending", "delivered", "failed"]).optional(),
    ...listFields,
  }),
  response: listOf(shownDelivery),
  example: {
    request: { endpoint_id: exampleEndpoint.id },
    response: { data: [exampleDelivery], next_cursor: null },
  },
  async run({ input: { endpoint_id, status, limit, cursor }, caller: { ctx } }) {
    const list = `webhook deliveries ${endpoint_id} ${status ?? "all"}`
    const before = cursor === undefined ? undefined : positionOf(ctx, list, cursor)
    const rows = await listDeliveries({ ctx, input: { endpoint_id, status, before, limit: limit + 1 } })
    return pageOf(ctx, list, rows.map(showDeliveryAs), limit, ({ id }) => id)
  },
})
