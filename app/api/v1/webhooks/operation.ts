import { z } from "zod"
import { listFields, listOf } from "@/app/api/v1/list-fields"
import { defineOperation } from "@/lib/api/define-operation"
import { pageOf, positionOf } from "@/lib/cursor"
import { createEndpoint, listEndpoints } from "@/lib/webhooks"
import { events, exampleEndpoint, showEndpointAs, shownEndpoint, targetUrl } from "./shown-endpoint"

export const listWebhooks = defineOperation({
  id: "listWebhooks",
  method: "GET",
  path: "/webhooks",
  tag: "Webhooks",
  summary: "Your webhook endpoints",
  description: "Newest first.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  request: z.strictObject(listFields),
  response: listOf(shownEndpoint),
  example: { request: {}, response: { data: [exampleEndpoint], next_cursor: null } },
  async run({ input: { limit, cursor }, caller: { ctx } }) {
    const before = cursor === undefined ? undefined : positionOf(ctx, "webhooks", cursor)
    const endpoints = (await listEndpoints({ ctx })).filter(({ id }) => before === undefined || id < before)
    return pageOf(ctx, "webhooks", endpoints.map(showEndpointAs), limit, ({ id }) => id)
  },
})

export const createWebhook = defineOperation({
  id: "createWebhook",
  method: "POST",
  path: "/webhooks",
  tag: "Webhooks",
  summary: "Make a webhook endpoint",
  description:
    "From now on each event of the list is posted to the URL, signed after the Standard Webhooks specification. Read " +
    "the secret that verifies the signature with `GET /webhooks/{endpoint_id}/secret`.",
  access: { kind: "key", scope: "webhooks" },
  units: 0,
  status: 201,
  stores: true,
  request: z.strictObject({ url: targetUrl, events }),
  response: shownEndpoint,
  problems: ["conflict"],
  example: {
    request: { url: exampleEndpoint.url, events: exampleEndpoint.events },
    response: exampleEndpoint,
  },
  async run({ input, caller: { ctx } }) {
    return showEndpointAs(await createEndpoint({ ctx, input }))
  },
})
