import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { deleteEndpoint, showEndpoint, updateEndpoint } from "@/lib/webhooks"
import {
  endpointId,
  events,
  exampleEndpoint,
  showEndpointAs,
  shownEndpoint,
  targetUrl,
} from "../shown-endpoint"

const path = "/webhooks/{endpoint_id}"
const endpoint_id = exampleEndpoint.id

export const readWebhook = defineOperation({
  id: "readWebhook",
  method: "GET",
  path,
  tag: "Webhooks",
  summary: "One webhook endpoint",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  request: z.strictObject({ endpoint_id: endpointId }),
  response: shownEndpoint,
  example: { request: { endpoint_id }, response: exampleEndpoint },
  async run({ input, caller: { ctx } }) {
    return showEndpointAs(await showEndpoint({ ctx, input }))
  },
})

export const changeWebhook = defineOperation({
  id: "changeWebhook",
  method: "PATCH",
  path,
  tag: "Webhooks",
  summary: "Change a webhook endpoint",
  description:
    "What is absent stays. Nothing of what happens while an endpoint is switched off is sent later. What waits to be " +
    "sent goes to the new URL.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  request: z.strictObject({
    endpoint_id: endpointId,
    url: targetUrl.optional(),
    events: events.optional(),
    disabled: z.boolean().optional().meta({ description: "Switches it off or on" }),
  }),
  response: shownEndpoint,
  example: {
    request: { endpoint_id, events: ["report.created"] },
    response: { ...exampleEndpoint, events: ["report.created"], updated_at: "2026-12-02T09:00:00.000Z" },
  },
  async run({ input, caller: { ctx } }) {
    return showEndpointAs(await updateEndpoint({ ctx, input }))
  },
})

export const deleteWebhook = defineOperation({
  id: "deleteWebhook",
  method: "DELETE",
  path,
  tag: "Webhooks",
  summary: "Delete a webhook endpoint",
  description: "With it go its deliveries, also those that wait to be sent.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  status: 204,
  request: z.strictObject({ endpoint_id: endpointId }),
  response: z.null(),
  example: { request: { endpoint_id }, response: null },
  async run({ input, caller: { ctx } }) {
    await deleteEndpoint({ ctx, input })
    return null
  },
})
