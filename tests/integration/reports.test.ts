import { execFile } from "node:child_process"
import { randomUUID } from "node:crypto"
import { promisify } from "node:util"
import request from "supertest"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { renderReport } from "@/app/report/pdf/render"
import { closePools, withTenant } from "@/db"
import { listActs } from "@/lib/audit"
import { sendReport } from "@/lib/reports"
import { createTestAccount, type TestAccount } from "../support/account"
import { waitForMail } from "../support/mailbox"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber } from "../support/subscriber"

const water = { ph: 6.8, kh_dkh: 4 }
const tank = {
  length_cm: 90,
  width_cm: 45,
  height_cm: 45,
  kh_dkh: 4,
  pump: { max_flow_l_h: 1000, max_head_m: 1.6 },
  hose: { inner_diameter_mm: 16, length_m: 3 },
  cylinder_mass_g: 2000,
  room_volume_m3: 40,
}

let account: TestAccount
let secret: string

beforeAll(async () => {
  takeSettings()
  account = await createTestAccount()
  secret = (await account.key({ scopes: ["calculate", "reports"] })).secret
})

afterAll(closePools)

function call(method: "get" | "post" | "delete", path: string, key = secret) {
  return request(stack().appUrl)[method](`/api/v1/reports${path}`).set("authorization", `Bearer ${key}`)
}

async function make(kind: string, input: object, more: object = {}): Promise<string> {
  const { body } = await call("post", "")
    .send({ kind, input, ...more })
    .expect(201)
  return body.id
}

async function unitsOf({ ctx }: TestAccount): Promise<number> {
  const ledger = await withTenant(ctx.account_id, (trx) =>
    trx.selectFrom("usage_event").select("units").where("account_id", "=", ctx.account_id).execute(),
  )
  return ledger.reduce((sum, { units }) => sum + units, 0)
}

describe("a report", () => {
  it("keeps what the calculation alone would have answered, for 10 units", async () => {
    const own = await createTestAccount()
    const key = (await own.key({ scopes: ["calculate", "reports"] })).secret
    const made = await call("post", "", key)
      .send({ kind: "carbonate_co2", input: water, title: "First reading", shopper: "The corner tank" })
      .expect(201)
    expect(made.headers["tarnwright-units"]).toBe("10")
    expect(await unitsOf(own)).toBe(10)
    const { body: alone } = await request(stack().appUrl)
      .post("/api/v1/carbonate/co2")
      .set("authorization", `Bearer ${key}`)
      .send(water)
    const { body: read } = await call("get", `/${made.body.id}`, key).expect(200)
    expect(read).toEqual(made.body)
    expect(read.answer).toEqual(alone)
    expect(read).toMatchObject({ title: "First reading", shopper: "The corner tank", shared_url: null })
  })

  it("is listed newest first, page by page, each once", async () => {
    const own = await createTestAccount()
    const key = (await own.key({ scopes: ["reports"] })).secret
    const ids: string[] = []
    for (let index = 0; index < 5; index++) {
      const { body } = await call("post", "", key).send({ kind: "carbonate_co2", input: water }).expect(201)
      ids.unshift(body.id)
    }
    const seen: string[] = []
    let cursor: string | null = ""
    while (cursor !== null) {
      const { body, headers }: request.Response = await call("get", "", key)
        .query({ limit: 2, ...(cursor && { cursor }) })
        .expect(200)
      seen.push(...body.data.map(({ id }: { id: string }) => id))
      cursor = body.next_cursor
      expect(Boolean(headers.link)).toBe(cursor !== null)
    }
    expect(seen).toEqual(ids)
  })

  it("that cannot be calculated, or that the cap holds back, is not stored and costs nothing", async () => {
    const own = await createTestAccount({ unit_cap: 15 })
    const key = (await own.key({ scopes: ["reports"] })).secret
    const wrong = await call("post", "", key).send({ kind: "carbonate_co2", input: { ph: 6.8 } })
    expect(wrong.status).toBe(422)
    expect(wrong.body.errors).toContainEqual(expect.objectContaining({ pointer: "/input/kh_dkh" }))
    const kinds = await call("post", "", key).send({ kind: "weather", input: {} })
    expect(kinds.status).toBe(422)
    await call("post", "", key).send({ kind: "carbonate_co2", input: water }).expect(201)
    await call("post", "", key).send({ kind: "carbonate_co2", input: water }).expect(402)
    const { body } = await call("get", "", key).expect(200)
    expect(body.data).toHaveLength(1)
    expect(await unitsOf(own)).toBe(10)
  })

  it("is made once for an Idempotency-Key", async () => {
    const own = await createTestAccount()
    const key = (await own.key({ scopes: ["reports"] })).secret
    const once = randomUUID()
    const send = () =>
      call("post", "", key).set("idempotency-key", once).send({ kind: "carbonate_co2", input: water })
    const first = await send().expect(201)
    const again = await send().expect(201)
    expect(again.body).toEqual(first.body)
    expect(again.headers["idempotency-replayed"]).toBe("true")
    expect(again.headers["tarnwright-units"]).toBe("0")
    expect(await unitsOf(own)).toBe(10)
  })

  it("of another account answers as one that never was", async () => {
    const id = await make("carbonate_co2", water)
    const other = (await (await createTestAccount()).key({ scopes: ["reports"] })).secret
    for (const [method, path] of [
      ["get", ""],
      ["get", "/pdf"],
      ["delete", ""],
      ["post", "/share"],
      ["delete", "/share"],
    ] as const) {
      const foreign = await call(method, `/${id}${path}`, other).send(method === "post" ? {} : undefined)
      const never = await call(method, `/rep_01kbc0x7qzf0ra2w6v8n4m3h5t${path}`, other).send(
        method === "post" ? {} : undefined,
      )
      expect(foreign.status, `${method} ${path}`).toBe(404)
      const { instance: _, ...said } = foreign.body
      const { instance: __, ...saidOfNone } = never.body
      expect(said).toEqual(saidOfNone)
    }
    await call("delete", `/${id}`).expect(204)
    await call("get", `/${id}`).expect(404)
  })
})

describe("a report on paper", () => {
  it("holds the set-point, a danger, the parts and the version of the engine", async () => {
    const id = await make("plan", tank, { title: "90 cm tank" })
    const { body: pdf, headers } = await call("get", `/${id}/pdf`).buffer(true).parse(binary).expect(200)
    expect(headers["content-type"]).toBe("application/pdf")
    const { body: report } = await call("get", `/${id}`).expect(200)
    const text = await textOf(pdf)
    expect(text).toContain("90 cm tank")
    expect(text).toContain(`${report.answer.result.ph.ph.toFixed(2)}`)
    expect(text).toMatch(/Danger\. This feed is/)
    expect(text).toContain("First start")
    expect(text).toContain("It replaces neither the manual")
    expect(text).toContain(report.engine_version)
    expect(text).not.toMatch(/NaN|undefined|null|\[object/)
  })

  it.each([
    ["carbonate_ph", { co2_mg_l: 30, kh_dkh: 4 }],
    ["gas_cylinder", { daily_use_g_day: 11, cylinder_mass_g: 2000 }],
    ["gas_room_safety", { cylinder_mass_g: 2000, room_volume_m3: 40 }],
  ])("can be made of every kind: %s", async (kind, input) => {
    const id = await make(kind, input)
    const { body: pdf } = await call("get", `/${id}/pdf`).buffer(true).parse(binary).expect(200)
    expect(await textOf(pdf)).not.toMatch(/NaN|undefined|\[object/)
  })

  it("does not fail with the one that cannot be set", async () => {
    const { body } = await call("post", "").send({ kind: "carbonate_co2", input: water }).expect(201)
    const whole = {
      ...body,
      created_at: new Date(body.created_at),
      account_name: "Fernhollow Aquatics",
    }
    const broken = renderReport({ ...whole, answer: {} })
    const good = renderReport(whole)
    await expect(broken).rejects.toThrow("could not be set")
    expect((await good).length).toBeGreaterThan(5_000)
  })
})

describe("a shared report", () => {
  it("is read by whoever has its address, until sharing ends; shared again it has another", async () => {
    const id = await make("carbonate_co2", water, { title: "Shared reading", shopper: "Somebody" })
    const { body } = await call("post", `/${id}/share`).send({}).expect(200)
    const { body: again } = await call("post", `/${id}/share`).send({}).expect(200)
    expect(again).toEqual(body)
    const slug = new URL(body.shared_url).pathname.replace("/r/", "")
    expect(slug).toMatch(/^[\w-]{24}$/)
    const { readSharedReport } = await import("@/lib/reports")
    const shared = await readSharedReport(slug)
    expect(shared.title).toBe("Shared reading")
    expect(JSON.stringify(shared)).not.toContain("Somebody")
    await call("delete", `/${id}/share`).expect(204)
    await expect(readSharedReport(slug)).rejects.toThrow("not shared")
    const { body: anew } = await call("post", `/${id}/share`).send({}).expect(200)
    expect(anew.shared_url).not.toBe(body.shared_url)
  })
})

describe("a report that is sent", () => {
  it("carries its answer, its dangers, its cautions and its link, and leaves the address in no table", async () => {
    const shop = await createSubscriber({ plan: "brand" })
    const ctx = shop.as("owner")
    const key = (await shop.key({ scopes: ["reports"] })).secret
    const { body: made } = await call("post", "", key)
      .send({ kind: "plan", input: tank, title: "Sent" })
      .expect(201)
    const email = `${randomUUID()}@fernhollow.test`
    const { url } = await sendReport({ ctx, input: { report_id: made.id, email } })
    const { text } = await waitForMail(email, "Sent")
    expect(text).toContain(`Hold the pH at: ${made.answer.result.ph.ph.toFixed(2)}`)
    expect(text).toContain("Danger: This feed is")
    expect(text).toContain("Caution: ")
    expect(text).toContain(url)
    const acts = await listActs({ ctx, input: { limit: 10 } })
    expect(JSON.stringify(acts)).toContain("report.sent")
    expect(JSON.stringify(acts)).not.toContain(email)
  })

  it("has one address, whoever shares it at the same time", async () => {
    const shop = await createSubscriber({ plan: "brand" })
    const key = (await shop.key({ scopes: ["reports"] })).secret
    const { body: made } = await call("post", "", key)
      .send({ kind: "carbonate_co2", input: water })
      .expect(201)
    const urls = await Promise.all(
      Array.from(
        { length: 8 },
        async () => (await call("post", `/${made.id}/share`, key).send({})).body.shared_url,
      ),
    )
    expect(new Set(urls).size).toBe(1)
  })
})

function binary(response: request.Response, done: (error: Error | null, body: Buffer) => void): void {
  const chunks: Buffer[] = []
  const stream = response as unknown as NodeJS.ReadableStream
  stream.on("data", (chunk: Buffer) => chunks.push(chunk))
  stream.on("end", () => done(null, Buffer.concat(chunks)))
}

/** The text of a PDF as Debian's poppler reads it. */
async function textOf(pdf: Buffer): Promise<string> {
  expect(pdf.subarray(0, 5).toString()).toBe("%PDF-")
  const running = promisify(execFile)("pdftotext", ["-layout", "-", "-"], { maxBuffer: 10_000_000 })
  running.child.stdin?.end(pdf)
  return (await running).stdout
}
