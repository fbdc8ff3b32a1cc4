import fc from "fast-check"
import { beforeAll, describe, expect, it } from "vitest"
import { registry } from "@/app/api/v1/registry"
import { type AnyOperation, scopes } from "@/lib/api/define-operation"
import "../support/fast-check"
import { createTestAccount } from "../support/account"
import { bodySchema, querySchemas, strayFromDocument } from "../support/document"
import { fuzzed, varied } from "../support/schema-arbitrary"
import { stack, takeSettings } from "../support/stack"

/** Cases of each operation; `FUZZ_CASES=1000 npm test -- fuzz` for a long night. */
const cases = Number(process.env.FUZZ_CASES ?? 60)

const keyed = registry.filter(({ access, csv }) => access.kind === "key" && !csv)

// So many accounts that their rates together are above what a machine serves.
const secrets: string[] = []
let turn = 0

beforeAll(async () => {
  takeSettings()
  for (let index = 0; index < 40; index++) {
    const account = await createTestAccount({ unit_cap: 1_000_000_000 })
    secrets.push((await account.key({ scopes: [...scopes] })).secret)
  }
})

describe.each(keyed.map((operation) => [operation.id, operation] as const))("%s", (_, operation) => {
  it("answers whatever it is sent as the document says, and never with a fault of ours", async () => {
    let succeeded = 0
    await fc.assert(
      fc.asyncProperty(requests(operation), async (sent) => {
        const response = await send(operation, sent)
        const text = await response.text()
        expect(response.status).not.toBe(429)
        expect(response.status, text.slice(0, 500)).toBeLessThan(500)
        expect(text).not.toMatch(/tarn_server_live_\w{40}/)
        const mediaType = response.headers.get("content-type")?.split(";")[0] ?? ""
        if (response.ok) succeeded += 1
        if (response.status >= 400) expect(mediaType).toBe("application/problem+json")
        if (!mediaType.endsWith("json")) return
        expect(text).not.toMatch(/:(-0|NaN|-?Infinity)[,}\]]/)
        const body = JSON.parse(text)
        expect(strayFromDocument(operation, { status: response.status, mediaType, body })).toEqual([])
      }),
      { numRuns: cases },
    )
    // Without ids to guess, what is drawn has to be good now and then, or nothing behind the checks was reached.
    if (!operation.path.includes("{")) expect(succeeded).toBeGreaterThan(0)
  }, 600_000)
})

interface Sent {
  readonly path: string
  readonly query: Record<string, unknown>
  readonly body: unknown
}

function requests(operation: AnyOperation): fc.Arbitrary<Sent> {
  const schema = bodySchema(operation)
  const params = [...operation.path.matchAll(/\{(\w+)\}/g)].map(([, name]) => name ?? "")
  const segment = fc.oneof(
    fc.constantFrom("..", "%00", "%E0%A4%A", "a".repeat(300), "key_01kbc0x7qzf0ra2w6v8n4m3h5t"),
    fc.string({ minLength: 1, maxLength: 40 }).map((text) => encodeURIComponent(text)),
  )
  const drawn: fc.Arbitrary<Record<string, unknown>> = fc.record(
    Object.fromEntries(
      Object.entries(querySchemas(operation)).map(([name, each]) => [name, fuzzed(each)] as const),
    ),
    { requiredKeys: [] },
  )
  const works = Object.entries(operation.example.request as object)
  const worksAsQuery = Object.fromEntries(works.filter(([name]) => !params.includes(name)))
  return fc.record({
    path: fc
      .tuple(...params.map(() => segment))
      .map((values) =>
        params.reduce((path, name, at) => path.replace(`{${name}}`, values[at] ?? ""), operation.path),
      ),
    query: schema ? fc.constant({}) : fc.oneof(drawn, fc.constant(worksAsQuery)),
    body: schema
      ? fc.oneof(fuzzed(schema), varied(operation.example.request as object, schema))
      : fc.constant(undefined),
  })
}

function send({ method }: AnyOperation, { path, query, body }: Sent): Promise<Response> {
  const url = new URL(`${stack().appUrl}/api/v1${path}`)
  for (const [name, value] of Object.entries(query))
    url.searchParams.set(name, typeof value === "string" ? value : JSON.stringify(value))
  const secret = secrets[turn++ % secrets.length]
  return fetch(url, {
    method,
    headers: { authorization: `Bearer ${secret}`, "content-type": "application/json" },
    ...(body !== undefined && { body: JSON.stringify(body) ?? "" }),
  })
}
