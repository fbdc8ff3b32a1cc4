import request from "supertest"
import { beforeAll, describe, expect, it } from "vitest"
import { withTenant } from "@/db"
import { startCluster, stopCluster } from "@/scripts/stack/postgres"
import { createTestAccount, type TestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"

const body = { ph: 6.8, kh_dkh: 4 }

beforeAll(() => takeSettings())

/** What the ledger and the counter say of an account: they must always agree. */
async function books({ ctx }: TestAccount) {
  return withTenant(ctx.account_id, async (trx) => {
    const ledger = await trx
      .selectFrom("usage_event")
      .selectAll()
      .where("account_id", "=", ctx.account_id)
      .execute()
    const counters = await trx
      .selectFrom("usage_counter")
      .selectAll()
      .where("account_id", "=", ctx.account_id)
      .execute()
    return { ledger, counters, units: ledger.reduce((sum, { units }) => sum + units, 0) }
  })
}

function post(path: string, secret: string, sent: object) {
  return request(stack().appUrl).post(`/api/v1${path}`).set("authorization", `Bearer ${secret}`).send(sent)
}

describe("a call that succeeds", () => {
  it("is in the ledger and the counter before its answer arrives, once", async () => {
    const account = await createTestAccount()
    const { secret, key } = await account.key()
    const response = await post("/carbonate/co2", secret, body).set("x-request-id", "my-own-id").expect(200)
    expect(response.headers["x-request-id"]).toBe("my-own-id")
    expect(response.headers["tarnwright-units"]).toBe("1")
    expect(response.headers["tarnwright-units-remaining"]).toBe("499999")
    const { ledger, counters } = await books(account)
    expect(ledger).toMatchObject([
      { key_id: key.id, operation: "carbonateCo2", units: 1, mode: "live", request_id: "my-own-id" },
    ])
    expect(counters).toMatchObject([{ mode: "live", units: 1 }])
  })

  it("answers with the limits that it counted against", async () => {
    const account = await createTestAccount({ plan: "storefront" })
    const { secret } = await account.key()
    const { headers } = await post("/carbonate/co2", secret, body).expect(200)
    expect(headers["ratelimit-policy"]).toMatch(/^"burst";q=25;w=1, "period";q=50000;w=\d+$/)
    expect(headers.ratelimit).toMatch(/^"burst";r=24;t=1, "period";r=49999;t=\d+$/)
  })
})

describe("a call that is refused", () => {
  it("costs nothing, whatever is wrong with it", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key()
    const refused = [
      await post("/carbonate/co2", secret, { ph: "6.8", kh_dkh: 4 }),
      await post("/carbonate/co2", secret, { ...body, typo: 1 }),
      await post("/carbonate/co2", secret, { ph: 4, kh_dkh: 30 }),
      await post("/carbonate/co2", `${secret.slice(0, -1)}!`, body),
      await request(stack().appUrl)
        .post("/api/v1/carbonate/co2")
        .set("authorization", `Bearer ${secret}`)
        .set("content-type", "application/json")
        .send('{"ph": NaN}'),
      await request(stack().appUrl)
        .post("/api/v1/carbonate/co2")
        .set("authorization", `Bearer ${secret}`)
        .set("content-type", "application/json"),
    ]
    expect(refused.map(({ status }) => status)).toEqual([422, 422, 422, 401, 400, 400])
    for (const { headers } of refused) expect(headers["content-type"]).toBe("application/problem+json")
    expect(await books(account)).toMatchObject({ ledger: [], counters: [] })
  })

  it("says that pure gas could not dissolve that much, and where", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key()
    const { body: problem } = await post("/carbonate/co2", secret, { ph: 4, kh_dkh: 30 }).expect(422)
    expect(problem.code).toBe("out_of_domain")
    expect(problem.errors).toHaveLength(1)
    expect(problem.type).toBe(`${stack().settings.PUBLIC_URL}/docs/errors/out_of_domain`)
  })
})

describe("the cap", () => {
  it("is met exactly by many calls at once, and not passed", async () => {
    const account = await createTestAccount({ unit_cap: 30 })
    const { secret } = await account.key()
    const statuses = (
      await Promise.all(Array.from({ length: 60 }, () => post("/carbonate/co2", secret, body)))
    ).map(({ status }) => status)
    expect(statuses.filter((status) => status === 200)).toHaveLength(30)
    expect(statuses.filter((status) => status === 402)).toHaveLength(30)
    const { units, counters } = await books(account)
    expect(units).toBe(30)
    expect(counters).toMatchObject([{ units: 30 }])
  })

  it("refuses the rest of a batch in whose middle it runs out", async () => {
    const account = await createTestAccount({ unit_cap: 4 })
    const { secret } = await account.key()
    const calls = Array.from({ length: 6 }, (_, index) => ({ id: `${index}`, path: "/carbonate/co2", body }))
    const response = await post("/batch", secret, { calls }).expect(200)
    expect(response.body.results.map(({ status }: { status: number }) => status)).toEqual([
      200, 200, 200, 200, 402, 402,
    ])
    expect(response.headers["tarnwright-units"]).toBe("4")
    expect((await books(account)).units).toBe(4)
  })

  it("is told of with the way out", async () => {
    const account = await createTestAccount({ plan: "nano", unit_cap: 0 })
    const { secret } = await account.key()
    const { body: problem } = await post("/carbonate/co2", secret, body).expect(402)
    expect(problem).toMatchObject({ code: "quota_reached", status: 402 })
    expect(problem.detail).toMatch(/larger plan/)
  })
})

describe("a batch", () => {
  it("gives each item the answer that it would have had alone, in order, and sums the units", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key()
    const calls = [
      { id: "first", path: "/carbonate/co2", body },
      { id: "wrong", path: "/carbonate/co2", body: { ph: 6.8 } },
      { id: "nested", path: "/batch", body: { calls: [] } },
      { id: "grid", path: "/carbonate/ph", body: { co2_mg_l: 30, kh_dkh: 4 } },
    ]
    const response = await post("/batch", secret, { calls }).expect(200)
    const results = response.body.results as { id: string; status: number; body: unknown }[]
    expect(results.map(({ id, status }) => [id, status])).toEqual([
      ["first", 200],
      ["wrong", 422],
      ["nested", 404],
      ["grid", 200],
    ])
    const alone = await post("/carbonate/co2", secret, body).expect(200)
    expect(results[0]?.body).toEqual(alone.body)
    expect(response.headers["tarnwright-units"]).toBe("2")
    expect((await books(account)).units).toBe(3)
  })

  it("is charged by runs of one operation, up to the cap, and counts each call", async () => {
    const account = await createTestAccount({ unit_cap: 6 })
    const { secret } = await account.key({ scopes: ["calculate", "usage"] })
    const paths = ["/carbonate/co2", "/carbonate/co2", "/gas/lead-time", "/gas/lead-time", "/carbonate/co2"]
    const tank = { volume_l: 180, surface_area_m2: 0.4, kh_dkh: 4 }
    const calls = paths.map((path, index) => ({
      id: `${index}`,
      path,
      body: path.startsWith("/gas") ? tank : body,
    }))
    const lastTwo = await post("/batch", secret, { calls: [...calls, ...calls] }).expect(200)
    const statuses = lastTwo.body.results.map(({ status }: { status: number }) => status)
    expect(statuses).toEqual([200, 200, 200, 200, 402, 402, 402, 402, 402, 402])
    expect(lastTwo.headers["tarnwright-units"]).toBe("6")
    expect(lastTwo.headers["tarnwright-units-remaining"]).toBe("0")
    const { ledger, units } = await books(account)
    expect(ledger.map(({ operation, calls }) => `${operation} ${calls}`).sort()).toEqual([
      "carbonateCo2 2",
      "gasLeadTime 2",
    ])
    expect(units).toBe(6)
    const today = new Date().toISOString().slice(0, 10)
    const { body: usage } = await request(stack().appUrl)
      .get("/api/v1/usage")
      .query({ from: today, to: today, by: "operation" })
      .set("authorization", `Bearer ${secret}`)
      .expect(200)
    expect(usage.data).toEqual([
      { group: "carbonateCo2", calls: 2, units: 2 },
      { group: "gasLeadTime", calls: 2, units: 4 },
    ])
  })

  it("takes 100 items and refuses 101", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key()
    const calls = Array.from({ length: 101 }, (_, index) => ({
      id: `${index}`,
      path: "/carbonate/co2",
      body,
    }))
    await post("/batch", secret, { calls }).expect(422)
    const { headers } = await post("/batch", secret, { calls: calls.slice(1) }).expect(200)
    expect(headers["tarnwright-units"]).toBe("100")
  })
})

describe("GET /usage", () => {
  it("equals the ledger, by day, operation and key", async () => {
    const account = await createTestAccount()
    const { secret, key } = await account.key({ scopes: ["calculate", "usage"] })
    for (let call = 0; call < 3; call++) await post("/carbonate/co2", secret, body).expect(200)
    await post("/carbonate/ph", secret, { co2_mg_l: 30, kh_dkh: 4 }).expect(200)
    const today = new Date().toISOString().slice(0, 10)
    const usage = async (by: string) =>
      (
        await request(stack().appUrl)
          .get("/api/v1/usage")
          .query({ from: today, to: today, by })
          .set("authorization", `Bearer ${secret}`)
          .expect(200)
      ).body
    expect(await usage("day")).toMatchObject({
      data: [{ group: today, calls: 4, units: 4 }],
      period: { units: 4, cap: 500_000 },
    })
    expect((await usage("operation")).data).toEqual([
      { group: "carbonateCo2", calls: 3, units: 3 },
      { group: "carbonatePh", calls: 1, units: 1 },
    ])
    expect((await usage("key")).data).toEqual([{ group: key.id, calls: 4, units: 4 }])
  })
})

describe("the sandbox", () => {
  it("is limited to 5 calls a second and counts apart from live calls", async () => {
    const account = await createTestAccount()
    const { secret } = await account.key({ mode: "sandbox" })
    const answers = await Promise.all(Array.from({ length: 12 }, () => post("/carbonate/co2", secret, body)))
    const limited = answers.filter(({ status }) => status === 429)
    expect(limited.length).toBeGreaterThan(0)
    expect(Number(limited[0]?.headers["retry-after"])).toBeGreaterThanOrEqual(1)
    const { counters } = await books(account)
    expect(counters).toMatchObject([{ mode: "sandbox", units: answers.length - limited.length }])
  })
})

describe("a lost database", () => {
  it("gives 503 with Retry-After, then the service recovers by itself", { timeout: 60_000 }, async () => {
    const account = await createTestAccount()
    const { secret } = await account.key()
    await post("/carbonate/co2", secret, body).expect(200)

    await stopCluster(stack().cluster, "immediate")
    const lost = await post("/carbonate/co2", secret, body)
    const health = await request(stack().appUrl).get("/api/v1/health")
    await startCluster(stack().cluster)

    expect(health.status).toBe(503)
    expect(lost.status).toBe(503)
    expect(Number(lost.headers["retry-after"])).toBeGreaterThan(0)
    expect(lost.body.code).toBe("unavailable")
    const answered = await eventually(() => post("/carbonate/co2", secret, body))
    expect(answered.status).toBe(200)
    expect((await books(account)).units).toBe(2)
  })
})

async function eventually(attempt: () => PromiseLike<request.Response>): Promise<request.Response> {
  const end = Date.now() + 20_000
  for (;;) {
    const response = await attempt()
    if (response.status === 200 || Date.now() > end) return response
    await new Promise((resolve) => setTimeout(resolve, 200))
  }
}
