import request from "supertest"
import { beforeAll, describe, expect, it } from "vitest"
import { registry } from "@/app/api/v1/registry"
import { type AnyOperation, scopes } from "@/lib/api/define-operation"
import { createTestAccount, type TestAccount } from "../support/account"
import { document, strayFromDocument } from "../support/document"
import { stack, takeSettings } from "../support/stack"

// The same cases for every operation of the registry, so that a new one cannot forget one of them.

const keyed = registry.filter(({ access }) => access.kind === "key")
const computed = keyed.filter(({ example }) => example.response === "computed")
const withJson = keyed.filter((operation) => hasBody(operation) && !operation.csv)

let account: TestAccount
let secret: string

beforeAll(async () => {
  takeSettings()
  account = await createTestAccount()
  secret = (await account.key({ scopes: [...scopes] })).secret
})

describe.each(computed.map((operation) => [operation.id, operation] as const))("%s", (_, operation) => {
  it("answers its example as the document says", async () => {
    const response = await call(operation, secret).send(operation.example.request as object)
    expect(response.status, JSON.stringify(response.body)).toBe(operation.status)
    expect(response.body).toEqual(documentedExample(operation))
    expectValid(operation, response)
    expect(response.headers["tarnwright-units"]).toBe(String(operation.units))
  })
})

describe.each(keyed.map((operation) => [operation.id, operation] as const))("%s", (_, operation) => {
  it("refuses a call without a key with 401", async () => {
    const response = await call(operation).send(bodyOf(operation))
    expect(response.status).toBe(401)
    expect(response.body.code).toBe("key_missing")
    expectValid(operation, response)
  })

  it("refuses an unknown key with 401", async () => {
    const response = await call(operation, `${secret}x`).send(bodyOf(operation))
    expect(response.status).toBe(401)
    expect(response.body.code).toBe("key_unknown")
  })

  it("refuses a revoked key with 401", async () => {
    const { revokeKey } = await import("@/lib/keys")
    const made = await account.key({ scopes: [...scopes] })
    await revokeKey({ ctx: account.ctx, input: { key_id: made.key.id } })
    const response = await call(operation, made.secret).send(bodyOf(operation))
    expect(response.status).toBe(401)
    expect(response.body.code).toBe("key_revoked")
  })

  it("refuses a key without its scope with 403", async () => {
    const needed = operation.access.kind === "key" ? operation.access.scope : undefined
    const other = await account.key({ scopes: scopes.filter((scope) => scope !== needed) })
    const response = await call(operation, other.secret).send(bodyOf(operation))
    expect(response.status).toBe(403)
    expect(response.body.code).toBe("scope_missing")
    expectValid(operation, response)
  })

  it("refuses a server key that a browser sends with 403", async () => {
    const response = await call(operation, secret)
      .set("origin", "https://shop.example")
      .send(bodyOf(operation))
    expect(response.status).toBe(403)
    expect(response.body.code).toBe("server_key_in_browser")
    expect(response.headers["access-control-allow-origin"]).toBeUndefined()
  })

  it("refuses an unknown field with 422 and points to it", async () => {
    const asBody = hasBody(operation) && !operation.csv
    const response = asBody
      ? await call(operation, secret).send({ ...(bodyOf(operation) as object), no_such_field: 1 })
      : await call(operation, secret).query({ no_such_field: 1 }).send(bodyOf(operation))
    expect(response.status).toBe(422)
    expect(response.body.errors).toContainEqual({
      pointer: "/no_such_field",
      detail: "There is no such field. Check its spelling and its unit.",
    })
    expectValid(operation, response)
  })
})

const withIds = keyed.filter(({ path }) => path.includes("{"))

describe.each(withIds.map((operation) => [operation.id, operation] as const))("%s", (_, operation) => {
  it("answers an id that never was with 404", async () => {
    const response = await call(operation, secret).send(bodyOf(operation))
    expect(response.status).toBe(404)
    expect(response.body.code).toBe("not_found")
    expectValid(operation, response)
  })
})

describe.each(keyed.map((operation) => [operation.id, operation] as const))("%s", (_, operation) => {
  it("refuses more calls than the rate allows with 429, and says when to come back", async () => {
    const { secret: sandbox } = await account.key({ mode: "sandbox", scopes: [...scopes] })
    const burst = await Promise.all(
      Array.from({ length: 9 }, () => call(operation, sandbox).send(bodyOf(operation))),
    )
    const refused = burst.find(({ status }) => status === 429)
    expect(refused?.body.code).toBe("rate_limited")
    expect(Number(refused?.headers["retry-after"])).toBeGreaterThanOrEqual(1)
    expect(refused?.headers.ratelimit).toMatch(/"burst";r=0;t=\d+/)
    if (refused) expectValid(operation, refused)
  })
})

describe.each(withJson.map((operation) => [operation.id, operation] as const))("%s", (_, operation) => {
  it("refuses a body over 256 KiB with 413", async () => {
    const response = await call(operation, secret)
      .set("content-type", "application/json")
      .send(JSON.stringify({ filler: "x".repeat(300 * 1024) }))
    expect(response.status).toBe(413)
    expectValid(operation, response)
  })

  it("refuses what is not JSON with 415, and malformed JSON with 400", async () => {
    const text = await call(operation, secret).set("content-type", "text/plain").send("ph=6.8")
    expect(text.status).toBe(415)
    expectValid(operation, text)
    const broken = await call(operation, secret).set("content-type", "application/json").send('{"ph": 6.8')
    expect(broken.status).toBe(400)
    expect(broken.body.code).toBe("malformed_json")
    expectValid(operation, broken)
  })
})

describe("the registry", () => {
  it("has unique ids and paths", () => {
    expect(new Set(registry.map(({ id }) => id)).size).toBe(registry.length)
    expect(new Set(registry.map(({ method, path }) => `${method} ${path}`)).size).toBe(registry.length)
  })

  it("is the document, operation by operation", () => {
    const documented = Object.values(
      document.paths as Record<string, Record<string, { operationId: string }>>,
    ).flatMap((methods) => Object.values(methods).map(({ operationId }) => operationId))
    expect(documented.sort()).toEqual(registry.map(({ id }) => id).sort())
  })

  it("refuses an unknown path with 404 and a wrong method with 405", async () => {
    const unknown = await request(stack().appUrl).get("/api/v1/no/such/thing")
    expect(unknown.status).toBe(404)
    expect(unknown.headers["content-type"]).toBe("application/problem+json")
    const wrong = await request(stack().appUrl).get("/api/v1/carbonate/co2")
    expect(wrong.status).toBe(405)
  })
})

function call(operation: AnyOperation, key?: string) {
  const example = operation.example.request as Record<string, unknown>
  const path = operation.path.replace(/\{(\w+)\}/g, (_, name: string) => String(example[name]))
  const method = operation.method.toLowerCase() as "get" | "post" | "patch" | "delete"
  const pending = request(stack().appUrl)[method](`/api/v1${path}`)
  if (operation.csv) pending.set("content-type", "text/csv")
  if (!hasBody(operation)) pending.query(rest(operation))
  return key ? pending.set("authorization", `Bearer ${key}`) : pending
}

function hasBody({ method }: AnyOperation): boolean {
  return method === "POST" || method === "PATCH"
}

function bodyOf(operation: AnyOperation): object | string | undefined {
  if (!hasBody(operation)) return undefined
  return operation.csv ? (operation.example.request as { csv: string }).csv : rest(operation)
}

/** The example's request without what stands in the path. */
function rest(operation: AnyOperation): object {
  const names = [...operation.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name)
  return Object.fromEntries(
    Object.entries(operation.example.request as object).filter(([name]) => !names.includes(name)),
  )
}

function documentedExample(operation: AnyOperation): unknown {
  const responses = document.paths[operation.path][operation.method.toLowerCase()].responses
  return responses[operation.status].content["application/json"].example
}

/** The answer is one that the document has: its status, its media type, its shape. */
function expectValid(operation: AnyOperation, { status, headers, body }: request.Response): void {
  const mediaType = headers["content-type"]?.split(";")[0] ?? ""
  expect(
    strayFromDocument(operation, { status, mediaType, body }),
    JSON.stringify(body).slice(0, 300),
  ).toEqual([])
}
