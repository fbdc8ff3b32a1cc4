import { randomUUID } from "node:crypto"
import request from "supertest"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { closePools, withTenant } from "@/db"
import { recordTank, type Tank, tankInsights } from "@/lib/insights"
import { createWidget } from "@/lib/widgets"
import { createTestAccount, type TestAccount } from "../support/account"
import { ownAddress } from "../support/address"
import { stack, takeSettings } from "../support/stack"

const shop = "https://shop.example"
const today = new Date().toISOString().slice(0, 10)

beforeAll(() => takeSettings())
afterAll(() => closePools())

async function opened(account: TestAccount): Promise<{ path: string; session_token: string }> {
  const input = { calculator: "co2-level", name: "Reactors", origins: [shop] } as const
  const { id } = await createWidget({ ctx: account.ctx, input })
  const { body } = await post(`/widgets/${id}/sessions`, {}).expect(200)
  return { path: `/widgets/${id}/events`, session_token: body.token }
}

function post(path: string, body: object, origin = shop) {
  return request(stack().appUrl).post(`/api/v1${path}`).agent(ownAddress()).set("origin", origin).send(body)
}

function eventsOf({ ctx }: TestAccount) {
  return withTenant(ctx.account_id, (trx) => trx.selectFrom("tank_event").selectAll().execute())
}

async function record(account: TestAccount, tanks: readonly Tank[], now = new Date()): Promise<void> {
  for (const tank of tanks) {
    await recordTank({
      ctx: { ...account.ctx, now },
      input: { widget_id: "wdgt_1", session_id: randomUUID(), tank },
    })
  }
}

const times = (count: number, tank: Tank) => Array.from({ length: count }, () => tank)
const insightsOf = ({ ctx }: TestAccount, from = today, to = today) =>
  tankInsights({ ctx, input: { from, to } })

describe("204: a widget's event", () => {
  it("is one tank a session, the last that it told, with the day and nothing of a person", async () => {
    const account = await createTestAccount()
    const { path, session_token } = await opened(account)
    for (const ph of [6.4, 6.8]) {
      const { headers } = await post(path, {
        session_token,
        tank: { ph, kh_dkh: 4, level: "in_range" },
      }).expect(204)
      expect(headers["tarnwright-units"]).toBe("0")
    }
    const events = await eventsOf(account)
    expect(events).toHaveLength(1)
    expect(events[0]).toMatchObject({ ph: 6.8, kh_dkh: 4, level: "in_range", volume_l: null })
    expect(Object.keys(events[0]!).sort()).toEqual(
      [
        "account_id",
        "day",
        "kh_dkh",
        "level",
        "method",
        "ph",
        "session_id",
        "temperature_c",
        "verdict",
      ].concat(["volume_l", "widget_id"]),
    )
    const charged = await withTenant(account.ctx.account_id, (trx) =>
      trx.selectFrom("usage_event").select("operation").execute(),
    )
    expect(charged).toEqual([{ operation: "openWidgetSession" }])
  })
})

describe("403, 422: an event that is refused is not kept", () => {
  it("from another origin, or without a session of the widget's", async () => {
    const account = await createTestAccount()
    const { path, session_token } = await opened(account)
    const tank = { kh_dkh: 4 }
    await post(path, { session_token, tank }, "https://other.example").expect(403)
    await post(path, { session_token: `${session_token}x`, tank }).expect(403)
    await post(path, { session_token: (await opened(account)).session_token, tank }).expect(403)
    expect(await eventsOf(account)).toEqual([])
  })

  it.each([
    ["a figure beyond its bounds", { volume_l: -1 }, "/tank/volume_l"],
    ["a method that is not known", { method: "bubble wand" }, "/tank/method"],
    ["a word of a person", { email: "ebba@shopper.test" }, "/tank/email"],
  ])("with %s", async (_, tank, pointer) => {
    const account = await createTestAccount()
    const { path, session_token } = await opened(account)
    const { body } = await post(path, { session_token, tank }).expect(422)
    expect(body.errors[0].pointer).toBe(pointer)
    expect(await eventsOf(account)).toEqual([])
  })
})

describe("the insights of an account", () => {
  it("count its own tanks in the days asked for, in steps of five", async () => {
    const [account, other] = [await createTestAccount(), await createTestAccount()]
    await record(account, times(7, { volume_l: 180, kh_dkh: 4, method: "inline_reactor", level: "in_range" }))
    await record(account, times(4, { volume_l: 60, kh_dkh: 4 }))
    await record(account, times(5, { volume_l: 1200, verdict: "suitable" }))
    await record(account, times(9, { volume_l: 180 }), new Date("2026-01-15T12:00:00Z"))
    await record(other, times(50, { volume_l: 180 }))
    expect(await insightsOf(account)).toEqual({
      volume_l: {
        tanks: 10,
        buckets: [
          { from: 150, below: 200, tanks: 5 },
          { from: 1000, below: null, tanks: 5 },
        ],
      },
      kh_dkh: { tanks: 10, buckets: [{ from: 4, below: 6, tanks: 10 }] },
      method: { tanks: 5, buckets: [{ name: "inline_reactor", tanks: 5 }] },
      level: { tanks: 5, buckets: [{ name: "in_range", tanks: 5 }] },
      verdict: { tanks: 5, buckets: [{ name: "suitable", tanks: 5 }] },
    })
    const january = await insightsOf(account, "2026-01-15", "2026-01-15")
    expect(january.volume_l).toEqual({ tanks: 5, buckets: [{ from: 150, below: 200, tanks: 5 }] })
  })

  it("are the same whether a bucket that is left out holds none or four", async () => {
    const account = await createTestAccount()
    await record(account, times(10, { volume_l: 180 }))
    const before = await insightsOf(account)
    await record(account, times(4, { volume_l: 20 }))
    expect(await insightsOf(account)).toEqual(before)
    await record(account, times(1, { volume_l: 20 }))
    expect((await insightsOf(account)).volume_l.tanks).toBe(15)
  })

  it("are read over the API by a key with the scope, for at most 400 days", async () => {
    const account = await createTestAccount()
    await record(account, times(6, { kh_dkh: 7 }))
    const { secret } = await account.key({ scopes: ["insights"] })
    const read = (query: string) =>
      request(stack().appUrl).get(`/api/v1/insights/tanks?${query}`).set("authorization", `Bearer ${secret}`)
    const { body } = await read(`from=${today}&to=${today}`).expect(200)
    expect(body.kh_dkh).toEqual({ tanks: 5, buckets: [{ from: 6, below: 8, tanks: 5 }] })
    for (const query of [
      "from=2026-12-02&to=2026-12-01",
      "from=2024-01-01&to=2026-12-01",
      "from=2026-12-01&to=today",
    ]) {
      expect((await read(query).expect(422)).body.errors[0].pointer).toBe("/to")
    }
  })
})
