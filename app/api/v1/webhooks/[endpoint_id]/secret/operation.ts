import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { showSecret } from "@/lib/webhooks"
import { endpointId, exampleEndpoint } from "../../shown-endpoint"

export const readWebhookSecret = defineOperation({
  id: "readWebhookSecret",
  method: "GET",
  path: "/webhooks/{endpoint_id}/secret",
  tag: "Webhooks",
  summary: "The secret that verifies an endpoint's webhooks",
  description: "Any library of the Standard Webhooks specification takes it as it is.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  request: z.strictObject({ endpoint_id: endpointId }),
  response: z.object({
    secret: z.string().meta({ description: "`whsec_` and 32 bytes in base64" }),
    previous_until: z.iso
      .datetime()
      .nullable()
      .meta({ description: "Until then webhooks are signed with the replaced secret as well" }),
  }),
  example: {
    request: { endpoint_id: exampleEndpoint.id },
    response: { secret: "whsec_bm90LWEtcmVhbC1zZWNyZXQtb25seS1hbi1leGFtcGw=", previous_until: null },
  },
  async run({ input, caller: { ctx } }) {
    const { secret, previous_until } = await showSecret({ ctx, input })
    return { secret, previous_until: previous_until?.toISOString() ?? null }
  },
})
