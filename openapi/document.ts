import {
  extendZodWithOpenApi,
  OpenAPIRegistry,
  OpenApiGeneratorV31,
  type ResponseConfig,
} from "@asteasolutions/zod-to-openapi"
import { z } from "zod"
import { registry } from "@/app/api/v1/registry"
import type { AnyOperation, Caller } from "@/lib/api/define-operation"
import { problems } from "@/lib/api/problem"
import { tags } from "@/lib/api/tags"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import type { ErrorCode } from "@/lib/errors"
import { webhookEvents } from "@/lib/webhooks"

extendZodWithOpenApi(z)

/** The OpenAPI 3.1 document of the registry: the same for the same registry, to the byte. */
export async function buildDocument(): Promise<object> {
  const definitions = new OpenAPIRegistry()
  const secretKey = definitions.registerComponent("securitySchemes", "key", {
    type: "http",
    scheme: "bearer",
    description:
      "A key of the account: `tarn_server_…` on servers, `tarn_browser_…` on pages of its origins.",
  })
  for (const operation of registry) {
    definitions.registerPath({
      method: operation.method.toLowerCase() as "get" | "post" | "patch" | "delete",
      path: operation.path,
      operationId: operation.id,
      tags: [operation.tag],
      summary: operation.summary,
      description: describe(operation),
      security: operation.access.kind === "key" ? [{ [secretKey.name]: [] }] : [],
      deprecated: operation.deprecation !== undefined,
      request: requestOf(operation),
      responses: { ...(await successOf(operation)), ...refusalsOf(operation) },
    })
  }
  for (const [type, event] of Object.entries(webhookEvents)) {
    definitions.registerWebhook(webhookOf(type, event))
  }
  return new OpenApiGeneratorV31(definitions.definitions).generateDocument({
    openapi: "3.1.0",
    info: {
      title: "Tarnwright API",
      version: ENGINE_VERSION,
      description:
        "CO2 answers for planted aquariums: levels, set-points, gas, flow and whole plans for CO2 in planted aquariums. Every answer carries its " +
        "uncertainty, cautions, assumptions, method and sources. The answers inform; they do not replace the " +
        "equipment's manual, local codes or licensed practice.",
      license: { name: "Proprietary", identifier: "LicenseRef-Tarnwright" },
    },
    servers: [
      { url: "/api/v1", description: "This host; the key says whether a call is live or in the sandbox" },
    ],
    tags: Object.entries(tags)
      .filter(([name]) => registry.some(({ tag }) => tag === name))
      .map(([name, description]) => ({ name, description })),
  })
}

const problem = z
  .looseObject({
    type: z.url().meta({ description: "Page that explains the problem" }),
    title: z.string(),
    status: z.int().meta({ "x-unit": "1" }),
    detail: z.string().meta({ description: "What is wrong here and how to mend it" }),
    instance: z.string().meta({ description: "Id of the request" }),
    code: z
      .enum(Object.keys(problems) as [ErrorCode, ...ErrorCode[]])
      .meta({ description: "Stable code to switch over" }),
    errors: z
      .array(
        z.object({
          pointer: z.string().meta({ description: "JSON Pointer into the body" }),
          detail: z.string(),
        }),
      )
      .optional(),
  })
  .meta({ id: "Problem", description: "A refusal, after RFC 9457" })

const shared: ErrorCode[] = [
  "not_found",
  "method_not_allowed",
  "validation_failed",
  "internal",
  "unavailable",
]
const ofKeys: ErrorCode[] = [
  "key_missing",
  "key_unknown",
  "key_revoked",
  "key_expired",
  "key_in_url",
  "server_key_in_browser",
  "origin_not_allowed",
  "address_not_allowed",
  "scope_missing",
  "account_suspended",
  "rate_limited",
]
const ofWidgets: ErrorCode[] = ["origin_not_allowed", "account_suspended", "rate_limited"]
const ofBodies: ErrorCode[] = ["malformed_json", "body_too_large", "media_type_unsupported"]

/** Every code with which an operation can refuse. */
export function codesOf(operation: AnyOperation): ErrorCode[] {
  const { access, method, units } = operation
  return [
    ...shared,
    ...(access.kind === "key" ? ofKeys : access.kind === "widget" ? ofWidgets : []),
    ...(method === "POST" || method === "PATCH" ? ofBodies : []),
    ...(units > 0 ? (["quota_reached", "rate_limited"] as const) : []),
    ...(operation.deprecation ? (["gone"] as const) : []),
    ...operation.problems,
  ]
}

function describe(operation: AnyOperation): string {
  const { access, units, description } = operation
  const needs =
    access.kind === "key"
      ? `Needs a key with the scope \`${access.scope}\`.`
      : access.kind === "widget"
        ? "Called by a widget from one of its origins."
        : "Needs no key."
  const costs = units === 0 ? "Costs nothing." : `Costs ${units} ${units === 1 ? "unit" : "units"}.`
  return [description, `${needs} ${costs}`].filter(Boolean).join("\n\n")
}

/** What an endpoint of the account receives. @source Standard Webhooks specification, "Webhook headers" */
function webhookOf(type: string, event: (typeof webhookEvents)[keyof typeof webhookEvents]) {
  const headers = z.object({
    "webhook-id": z.string().meta({ description: "Id of the event, the same whenever it is sent again" }),
    "webhook-timestamp": z.string().meta({ description: "When this attempt was made, in Unix seconds" }),
    "webhook-signature": z.string().meta({
      description: "`v1,` and the HMAC-SHA-256 of `id.timestamp.body` in base64; two during a rotation",
    }),
  })
  const schema = z.object({ type: z.literal(type), timestamp: z.iso.datetime(), data: event.data })
  const example = { type, timestamp: "2026-12-01T09:30:00.000Z", data: event.example }
  const name = type.replace(/[._](\w)/g, (_, letter: string) => letter.toUpperCase())
  return {
    path: type,
    method: "post" as const,
    operationId: `on${name.charAt(0).toUpperCase()}${name.slice(1)}`,
    tags: ["Webhooks"],
    summary: event.summary,
    description: "Verify the signature, answer with 2xx within 15 seconds, and do the work afterwards.",
    security: [],
    request: { headers, body: { required: true, content: { "application/json": { schema, example } } } },
    responses: {
      "2XX": {
        description: "You have it. Any other answer, or none, is followed by up to nine more attempts.",
      },
      410: { description: "You want no more: the endpoint is switched off." },
    },
  }
}

function requestOf(operation: AnyOperation) {
  const names = new Set([...operation.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name))
  const params = names.size === 0 ? undefined : pick(operation.request, (name) => names.has(name))
  if (operation.method === "GET" || operation.method === "DELETE") {
    return { params, query: pick(operation.request, (name) => !names.has(name)) }
  }
  if (operation.csv) {
    const { csv } = operation.example.request as { csv: string }
    const query = pick(operation.request, (name) => !names.has(name) && name !== "csv")
    return {
      params,
      query,
      body: { required: true, content: { "text/csv": { schema: z.string(), example: csv } } },
    }
  }
  const schema = names.size === 0 ? operation.request : pick(operation.request, (name) => !names.has(name))
  const example = Object.fromEntries(
    Object.entries(operation.example.request as object).filter(([name]) => !names.has(name)),
  )
  return { params, body: { required: true, content: { "application/json": { schema, example } } } }
}

/** The members of an object schema that fit, as a strict schema; undefined where there are none. */
function pick(schema: z.ZodType, fits: (name: string) => boolean): z.ZodObject | undefined {
  if (!(schema instanceof z.ZodObject))
    throw new Error("The request of an operation with parameters is an object")
  const members = Object.entries(schema.shape as z.ZodRawShape).filter(([name]) => fits(name))
  return members.length > 0 ? z.strictObject(Object.fromEntries(members)) : undefined
}

async function successOf(operation: AnyOperation): Promise<Record<string, ResponseConfig>> {
  const description =
    operation.status === 201 ? "It was made." : operation.status === 204 ? "Done." : "The answer."
  if (operation.status === 204) return { 204: { description } }
  // OpenAPI 3.1: bytes have no schema, their media type says it all.
  if (operation.pdf)
    return { [operation.status]: { description, content: { "application/pdf": { schema: {} } } } }
  return {
    [operation.status]: {
      description,
      content: { "application/json": { schema: operation.response, example: await exampleOf(operation) } },
    },
  }
}

/** The example's answer: as the operation states it, or found by running the operation. */
export async function exampleOf(operation: AnyOperation): Promise<unknown> {
  const { request, response } = operation.example
  if (response !== "computed") return response
  const caller: Caller = {
    get ctx(): never {
      throw new Error(`${operation.id} needs an account, so it cannot have a computed example`)
    },
    origin: undefined,
    charge: () => Promise.resolve(),
    perform: () =>
      Promise.reject(new Error(`${operation.id} calls others, so it cannot have a computed example`)),
  }
  return operation.run({ input: operation.request.parse(request), caller })
}

function refusalsOf(operation: AnyOperation) {
  const byStatus = new Map<number, Set<ErrorCode>>()
  for (const code of codesOf(operation)) {
    const { status } = problems[code]
    byStatus.set(status, (byStatus.get(status) ?? new Set()).add(code))
  }
  return Object.fromEntries(
    [...byStatus]
      .sort(([one], [other]) => one - other)
      .map(([status, codes]) => [
        status,
        {
          description: [...codes].map((code) => `\`${code}\`: ${problems[code].title}.`).join(" "),
          content: { "application/problem+json": { schema: problem } },
        },
      ]),
  )
}
