import { z } from "zod"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { bool, clearable, mergeMetadata, metadata, page, str } from "../core/params"
import { route } from "../core/route"

export const events = [
  route(
    "GET",
    "/v1/events",
    z.strictObject({ ...page, type: str.optional(), types: z.array(str).max(20).optional() }),
    ({ fake, params }) => {
      const found = fake
        .all("event")
        .filter((one) => !params.type || matches(one.type, params.type))
        .filter((one) => !params.types || params.types.some((type) => matches(one.type, type)))
      return pageOf(found, params, "/v1/events")
    },
  ),
  route("GET", "/v1/events/:id", z.strictObject({}), ({ fake, path }) => fake.get("event", path.id!)),
  route("GET", "/v2/core/events/:id", z.strictObject({}), ({ fake, path }) =>
    fake.get("v2.core.event", path.id!),
  ),
]

export const webhookEndpoints = [
  route(
    "POST",
    "/v1/webhook_endpoints",
    z.strictObject({
      url: z.url({ protocol: /^https?$/ }),
      enabled_events: z.array(str).min(1),
      api_version: str.optional(),
      description: clearable.optional(),
      metadata: metadata.optional(),
    }),
    ({ fake, params }) => {
      const endpoint = fake.put("webhook_endpoint", {
        id: newId("we"),
        object: "webhook_endpoint",
        api_version: params.api_version ?? null,
        application: null,
        created: fake.now(),
        description: params.description ?? null,
        enabled_events: params.enabled_events,
        livemode: false,
        metadata: mergeMetadata({}, params.metadata),
        secret: newId("whsec"),
        status: "enabled",
        url: params.url,
      })
      return endpoint
    },
  ),
  route("GET", "/v1/webhook_endpoints", z.strictObject(page), ({ fake, params }) =>
    pageOf(fake.all("webhook_endpoint").map(withoutSecret), params, "/v1/webhook_endpoints"),
  ),
  route("GET", "/v1/webhook_endpoints/:id", z.strictObject({}), ({ fake, path }) =>
    withoutSecret(fake.get("webhook_endpoint", path.id!)),
  ),
  route(
    "POST",
    "/v1/webhook_endpoints/:id",
    z.strictObject({
      url: str.optional(),
      enabled_events: z.array(str).min(1).optional(),
      disabled: bool.optional(),
      description: clearable.optional(),
    }),
    ({ fake, params, path }) => {
      const endpoint = fake.get("webhook_endpoint", path.id!)
      const { disabled, ...rest } = params
      Object.assign(endpoint, rest)
      if (disabled !== undefined) endpoint.status = disabled ? "disabled" : "enabled"
      fake.changed()
      return withoutSecret(endpoint)
    },
  ),
  route("DELETE", "/v1/webhook_endpoints/:id", z.strictObject({}), ({ fake, path }) => {
    const { id } = fake.get("webhook_endpoint", path.id!)
    delete fake.state.objects.webhook_endpoint[id]
    fake.changed()
    return { id, object: "webhook_endpoint", deleted: true }
  }),
]

/** The signing secret is shown once, in the answer that makes the endpoint. */
function withoutSecret<T extends { secret?: unknown }>(endpoint: T): Omit<T, "secret"> {
  const { secret: _secret, ...shown } = endpoint
  return shown
}

function matches(type: string, wanted: string): boolean {
  return wanted.endsWith(".*") ? type.startsWith(wanted.slice(0, -1)) : type === wanted
}
