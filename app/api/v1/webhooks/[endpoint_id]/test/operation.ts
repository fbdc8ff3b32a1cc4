import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { sendTestEvent } from "@/lib/webhooks"
import { queuedDelivery, showDeliveryAs, shownDelivery } from "../../shown-delivery"
import { endpointId, exampleEndpoint } from "../../shown-endpoint"

export const testWebhook = defineOperation({
  id: "testWebhook",
  method: "POST",
  path: "/webhooks/{endpoint_id}/test",
  tag: "Webhooks",
  summary: "Send a test event to an endpoint",
  description:
    "Signed, logged and repeated as any other; its type is `webhook.test`, which needs no subscription.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  status: 201,
  stores: true,
  request: z.strictObject({ endpoint_id: endpointId }),
  response: shownDelivery,
  problems: ["conflict"],
  example: {
    request: { endpoint_id: exampleEndpoint.id },
    response: { ...queuedDelivery, type: "webhook.test" },
  },
  async run({ input, caller: { ctx } }) {
    return showDeliveryAs(await sendTestEvent({ ctx, input }))
  },
})
