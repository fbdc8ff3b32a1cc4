import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { rotateSecret } from "@/lib/webhooks"
import { endpointId, exampleEndpoint } from "../../../shown-endpoint"

export const rotateWebhookSecret = defineOperation({
  id: "rotateWebhookSecret",
  method: "POST",
  path: "/webhooks/{endpoint_id}/secret/rotate",
  tag: "Webhooks",
  summary: "Replace an endpoint's secret",
  description:
    "During the overlap each webhook carries two signatures, one of each secret. Read the new one with " +
    "`GET /webhooks/{endpoint_id}/secret`. A secret that was replaced before stops signing at once.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  stores: true,
  request: z.strictObject({
    endpoint_id: endpointId,
    overlap_h: z
      .number()
      .min(0)
      .max(168)
      .default(24)
      .meta({ description: "Hours for which the replaced secret signs as well", "x-unit": "h" }),
  }),
  response: z.object({
    previous_until: z.iso
      .datetime()
      .nullable()
      .meta({ description: "Until then the replaced secret signs as well" }),
  }),
  example: {
    request: { endpoint_id: exampleEndpoint.id, overlap_h: 24 },
    response: { previous_until: "2026-12-02T09:00:00.000Z" },
  },
  async run({ input, caller: { ctx } }) {
    const { previous_until } = await rotateSecret({ ctx, input })
    return { previous_until: previous_until?.toISOString() ?? null }
  },
})
