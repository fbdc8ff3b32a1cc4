import { createServer, type Server } from "node:http"
import type { AddressInfo } from "node:net"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { nextMount } from "@/lib/api/next-mount"
import { nodeMount } from "@/lib/api/node-mount"
import { createServe } from "@/lib/api/serve"
import { codesOf } from "@/openapi/document"
import { takeSettings } from "../support/stack"

const page = "https://tarnwright.example/changelog#old-answer"
const day_ms = 86_400_000

function retiring(path: string, sunset: Date) {
  return defineOperation({
    id: path.slice(1),
    method: "GET",
    path,
    tag: "Service",
    summary: "An answer of old",
    access: { kind: "public" },
    units: 0,
    request: z.strictObject({}),
    response: z.object({ old: z.boolean() }),
    example: { request: {}, response: { old: true } },
    deprecation: { since: new Date("2026-06-01T00:00:00Z"), sunset, page },
    run: () => ({ old: true }),
  })
}

const later = new Date(Math.ceil((Date.now() + 200 * day_ms) / 1000) * 1000)
const registry = [retiring("/old", later), retiring("/older", new Date(Date.now() - day_ms))]

let server: Server

beforeAll(async () => {
  takeSettings()
  const serve = createServe({ registry, publicUrl: "https://tarnwright.example" })
  server = createServer(nodeMount(serve))
  await new Promise<void>((resolve) => server.listen(0, "127.0.0.1", resolve))
})

afterAll(() => new Promise((resolve) => server.close(resolve)))

const mounts = [
  [
    "the API lane",
    (path: string) => fetch(`http://127.0.0.1:${(server.address() as AddressInfo).port}/api/v1${path}`),
  ],
  [
    "the route handlers",
    (path: string) => nextMount(registry).GET(new Request(`https://tarnwright.example/api/v1${path}`)),
  ],
] as const

describe.each(mounts)("an operation that is to be retired, through %s", (_, get) => {
  it("says since when, until when and where to read on, as RFC 9745 and RFC 8594 write it", async () => {
    const answer = await get("/old")
    expect(answer.status).toBe(200)
    expect(answer.headers.get("deprecation")).toBe("@1780272000")
    expect(answer.headers.get("sunset")).toBe(later.toUTCString())
    expect(answer.headers.get("link")).toBe(`<${page}>; rel="deprecation"; type="text/html"`)
  })

  it("says so as well when it refuses", async () => {
    const answer = await get("/old?no_such=1")
    expect(answer.status).toBe(422)
    expect(answer.headers.get("deprecation")).toBe("@1780272000")
  })

  it("is gone after its sunset, and says what to use in its place", async () => {
    const answer = await get("/older")
    expect(answer.status).toBe(410)
    expect(answer.headers.get("content-type")).toBe("application/problem+json")
    expect(await answer.json()).toMatchObject({
      code: "gone",
      type: expect.stringMatching(/\/docs\/errors\/gone$/),
      detail: expect.stringContaining(page),
    })
  })
})

describe("the document", () => {
  it("tells of the 410 of such an operation, and of no other", () => {
    expect(registry.map((operation) => codesOf(operation).includes("gone"))).toEqual([true, true])
    expect(codesOf({ ...retiring("/new", later), deprecation: undefined })).not.toContain("gone")
  })
})
