import pg from "pg"
import type Stripe from "stripe"
import { afterAll, beforeAll, beforeEach, describe, expect, it } from "vitest"
import { asWorker, closePools } from "@/db"
import { compareOverage, reportOverage, setSpendingCap, showBilling, startCheckout } from "@/lib/billing"
import { newId } from "@/lib/id"
import { advanceClock, control, customerWithCard } from "../fakes/stripe/subject"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber, type Subscriber, standInClient, until, visit } from "../support/subscriber"

// The ledger has no door for calls of the past, so these are written by the one role that may do anything.
let database: pg.Client

beforeAll(async () => {
  takeSettings()
  database = new pg.Client({ connectionString: stack().databaseUrls.superuser })
  await database.connect()
})

afterAll(async () => {
  await database.end()
  await closePools()
})

beforeEach(() => control({ url: stack().stripeFakeUrl }, "DELETE", "faults"))

const HOUR_MS = 3_600_000
const DAY_S = 86_400

interface Billed {
  subscriber: Subscriber
  customer: string
  clock: string
  /** First instant of the period, and the end of it. */
  start: Date
  end: Date
}

/** An account on Storefront whose period began twenty days ago, allowed 800 US dollars beyond the plan. */
async function billed(): Promise<Billed> {
  const subscriber = await createSubscriber()
  const stripe = standInClient()
  const frozen_time = Math.floor(Date.now() / 1000) - 20 * DAY_S
  const { id: clock } = await stripe.testHelpers.testClocks.create({ frozen_time })
  const { id: customer } = await customerWithCard(stripe, "pm_card_visa", { test_clock: clock })
  await asWorker((trx) =>
    trx
      .updateTable("account")
      .set({ stripe_customer_id: customer })
      .where("id", "=", subscriber.ctx.account_id)
      .execute(),
  )
  const ctx = subscriber.as("owner")
  await visit((await startCheckout({ ctx, input: { plan: "storefront" } })).url, { card: "pays" })
  const { subscription } = await until(async () => {
    const billing = await showBilling({ ctx })
    return billing.subscription ? billing : undefined
  })
  await setSpendingCap({ ctx, input: { overage_cap_minor: 80_000 } })
  const { current_period_start: start, current_period_end: end } = subscription!
  return { subscriber, customer, clock, start, end }
}

/** Writes a call of `units` into the ledger and the counter, as the group commit did at that time. */
async function spend({ subscriber, start, end }: Billed, at: Date, units: number): Promise<void> {
  const { account_id } = subscriber.ctx
  await database.query(
    `insert into usage_event (account_id, at, id, key_id, mode, operation, units, engine_version, request_id)
     values ($1, $2, $3, 'key_test', 'live', 'carbonateCo2', $4, 'test', 'req_test')`,
    [account_id, at, newId("call"), units],
  )
  await database.query(
    `insert into usage_counter (account_id, mode, period_start, period_end, units) values ($1, 'live', $2, $3, $4)
     on conflict (account_id, mode, period_start) do update set units = usage_counter.units + excluded.units`,
    [account_id, start, end, units],
  )
}

/** The first full hour of the period, `hours` later. */
function hourOf({ start }: Billed, hours: number): Date {
  return new Date((Math.floor(start.getTime() / HOUR_MS) + 1 + hours) * HOUR_MS)
}

const minutes = (at: Date, n: number) => new Date(at.getTime() + n * 60_000)
const report = ({ subscriber }: Billed, now = new Date()) =>
  reportOverage({ account_id: subscriber.ctx.account_id, now })

/** What Stripe counts, by the hour. */
async function counted({ customer, start }: Billed): Promise<[string, number][]> {
  const stripe = standInClient()
  const { data: meters } = await stripe.billing.meters.list({ limit: 100 })
  const meter = meters.find((one) => one.event_name === "tarnwright_overage_units") as Stripe.Billing.Meter
  const { data } = await stripe.billing.meters.listEventSummaries(meter.id, {
    customer,
    start_time: Math.floor(start.getTime() / HOUR_MS) * 3600,
    end_time: Math.floor(Date.now() / HOUR_MS) * 3600,
    value_grouping_window: "hour",
    limit: 100,
  })
  return data.reverse().map((one) => [new Date(one.start_time * 1000).toISOString(), one.aggregated_value])
}

describe("units beyond the plan", () => {
  it("are reported by the hour, only those beyond, and billed at the plan's price", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 1), 10), 49_000)
    await spend(account, minutes(hourOf(account, 2), 10), 3_000)
    await spend(account, minutes(hourOf(account, 2), 50), 1_000)
    await spend(account, minutes(hourOf(account, 5), 0), 7_000)
    await report(account)
    expect(await counted(account)).toEqual([
      [hourOf(account, 2).toISOString(), 3_000],
      [hourOf(account, 5).toISOString(), 7_000],
    ])
    await advanceClock(standInClient(), account.clock, account.end.getTime() / 1000 + 2 * 3600)
    const { data } = await standInClient().invoices.list({ customer: account.customer, limit: 1 })
    // 29 US dollars for the month ahead and 10,000 units at 0.80 a thousand.
    expect(data[0]).toMatchObject({ status: "paid", total: 2900 + 800 })
  })

  it("cost nothing while the plan's own units last", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 1), 10), 50_000)
    await report(account)
    expect(await counted(account)).toEqual([])
  })

  it("count once however often they are reported", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 3), 10), 51_000)
    for (let run = 0; run < 3; run += 1) await report(account)
    // As after a crash between the reading and the note that it was delivered.
    await asWorker((trx) =>
      trx
        .updateTable("overage_report")
        .set({ delivered_at: null })
        .where("account_id", "=", account.subscriber.ctx.account_id)
        .execute(),
    )
    await report(account)
    expect(await counted(account)).toEqual([[hourOf(account, 3).toISOString(), 1_000]])
  })

  it("grow with a call that came late into the ledger", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 3), 10), 51_000)
    await report(account)
    await spend(account, minutes(hourOf(account, 3), 20), 500)
    await report(account)
    expect(await counted(account)).toEqual([[hourOf(account, 3).toISOString(), 1_500]])
  })

  it("reach Stripe in the end when it fails before and after taking them", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 3), 10), 51_000)
    const path = "/v1/billing/meter_events"
    const fake = { url: stack().stripeFakeUrl }
    await control(fake, "POST", "faults", { kind: "error_before", status: 503, times: 3, path })
    await expect(report(account)).rejects.toThrow("could not be reported")
    await control(fake, "POST", "faults", { kind: "error_after", status: 500, times: 1, path })
    await report(account).catch(() => {})
    await report(account)
    expect(await counted(account)).toEqual([[hourOf(account, 3).toISOString(), 1_000]])
  })

  it("of the piece of an hour before the period's first full one count in that one", async () => {
    const account = await billed()
    await spend(account, minutes(account.start, 0), 50_500)
    await spend(account, minutes(hourOf(account, 0), 5), 100)
    await report(account)
    expect(await counted(account)).toEqual([[hourOf(account, 0).toISOString(), 600]])
  })

  it("are not reported until their calls have settled", async () => {
    const account = await billed()
    const at = minutes(hourOf(account, 3), 10)
    await spend(account, at, 51_000)
    await report(account, minutes(at, 1))
    expect(await counted(account)).toEqual([])
    await report(account, minutes(at, 3))
    expect(await counted(account)).toHaveLength(1)
  })

  it("keep the price of the plan under which they were spent when the plan grows", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 3), 10), 60_000)
    await report(account)
    await database.query("update subscription set plan = 'brand' where account_id = $1", [
      account.subscriber.ctx.account_id,
    ])
    await spend(account, minutes(hourOf(account, 6), 10), 100_000)
    await report(account)
    expect(await counted(account)).toEqual([[hourOf(account, 3).toISOString(), 10_000]])
  })
})

describe("the comparison with Stripe", () => {
  const mine = async ({ subscriber }: Billed) =>
    (await compareOverage({ now: new Date() })).filter(
      ({ account_id }) => account_id === subscriber.ctx.account_id,
    )

  it("finds nothing when all arrived", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 3), 10), 51_000)
    await report(account)
    expect(await mine(account)).toEqual([])
  })

  it("names the hour that Stripe took and did not count", async () => {
    const account = await billed()
    await spend(account, minutes(hourOf(account, 3), 10), 51_000)
    const fault = { kind: "meter_async_error", customer: account.customer }
    await control({ url: stack().stripeFakeUrl }, "POST", "faults", fault)
    await report(account)
    const { account_id } = account.subscriber.ctx
    expect(await mine(account)).toEqual([{ account_id, hour: hourOf(account, 3), ours: 1_000, theirs: 0 }])
  })
})
