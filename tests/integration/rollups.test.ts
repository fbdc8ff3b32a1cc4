import pg from "pg"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools, withTenant } from "@/db"
import { newId } from "@/lib/id"
import { commitUsage, type Drift, describeDrift, reconcileUsage, rollUpUsage } from "@/lib/usage"
import { createTestAccount, type TestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"

let superuser: pg.Client

// No role of the product may write the ledger's past, so the tests do it as the superuser of their own cluster.
beforeAll(async () => {
  takeSettings()
  superuser = new pg.Client({ connectionString: stack().databaseUrls.superuser })
  await superuser.connect()
})

afterAll(async () => {
  await superuser.end()
  await closePools()
})

interface PastCall {
  readonly at: Date
  readonly operation?: string
  readonly key_id?: string
  readonly mode?: string
  readonly units?: number
}

async function writeLedger({ ctx }: TestAccount, calls: readonly PastCall[]): Promise<void> {
  for (const { at, operation = "carbonateCo2", key_id = "key_a", mode = "live", units = 1 } of calls) {
    await superuser.query(
      `insert into usage_event (account_id, at, id, key_id, mode, operation, units, engine_version, request_id)
       values ($1, $2, $3, $4, $5, $6, $7, '2026.12.1', 'r')`,
      [ctx.account_id, at, newId("call"), key_id, mode, operation, units],
    )
  }
}

/** Lets the next run begin so many hours ago, as if the worker had been away. */
async function unroll(hours: number): Promise<void> {
  await superuser.query(
    `update usage_rollup set rolled_until = date_trunc('hour', now() - make_interval(hours => $1), 'UTC')`,
    [hours],
  )
}

async function hoursOf({ ctx }: TestAccount) {
  const { rows } = await superuser.query(
    `select to_char(hour at time zone 'UTC', 'YYYY-MM-DD HH24') as hour, mode, operation, key_id, calls::int, units::int
       from usage_hour where account_id = $1 order by 1, 2, 3, 4`,
    [ctx.account_id],
  )
  return rows
}

/** The start of the UTC hour so many hours ago, in the database's clock. */
async function hourAgo(hours: number): Promise<Date> {
  const { rows } = await superuser.query(
    `select date_trunc('hour', now() - make_interval(hours => $1), 'UTC') as hour`,
    [hours],
  )
  return rows[0].hour
}

const msAfter = (start: Date, ms: number) => new Date(start.getTime() + ms)
const nameOf = (hour: Date) => hour.toISOString().slice(0, 13).replace("T", " ")

describe("the hourly sums", () => {
  it("hold each closed hour by mode, operation and key, to the last millisecond of it", async () => {
    const account = await createTestAccount()
    const [earlier, later] = [await hourAgo(4), await hourAgo(3)]
    await writeLedger(account, [
      { at: earlier },
      { at: msAfter(earlier, 1_800_000), units: 2, operation: "carbonateGrid" },
      { at: msAfter(earlier, 3_599_999) },
      { at: later },
      { at: later, key_id: "key_b", units: 5 },
      { at: later, mode: "sandbox" },
    ])
    await unroll(5)
    await rollUpUsage()
    const row = (hour: Date, rest: object) => ({ hour: nameOf(hour), mode: "live", key_id: "key_a", ...rest })
    expect(await hoursOf(account)).toEqual([
      row(earlier, { operation: "carbonateCo2", calls: 2, units: 2 }),
      row(earlier, { operation: "carbonateGrid", calls: 1, units: 2 }),
      row(later, { operation: "carbonateCo2", calls: 1, units: 1 }),
      row(later, { operation: "carbonateCo2", key_id: "key_b", calls: 1, units: 5 }),
      row(later, { operation: "carbonateCo2", mode: "sandbox", calls: 1, units: 1 }),
    ])
  })

  it("stay the same when an hour is summed again, and take in what came into the ledger since", async () => {
    const account = await createTestAccount()
    const hour = await hourAgo(3)
    await writeLedger(account, [{ at: hour }, { at: msAfter(hour, 1) }])
    for (let run = 0; run < 3; run++) {
      await unroll(5)
      await Promise.all([rollUpUsage(), rollUpUsage()])
      expect(await hoursOf(account)).toMatchObject([{ calls: 2, units: 2 }])
    }
    await writeLedger(account, [{ at: msAfter(hour, 2), units: 3 }])
    await unroll(5)
    await rollUpUsage()
    expect(await hoursOf(account)).toMatchObject([{ calls: 3, units: 5 }])
  })

  it("end ten minutes before now, at a full hour: the hour that runs is not in them", async () => {
    const account = await createTestAccount()
    const { rows } = await superuser.query("select now() as now")
    await writeLedger(account, [{ at: rows[0].now }])
    await unroll(5)
    const rolled = await rollUpUsage()
    const { rows: expected } = await superuser.query(
      "select date_trunc('hour', now() - interval '10 minutes', 'UTC') as until",
    )
    expect(rolled?.until).toEqual(expected[0].until)
    expect(await hoursOf(account)).toEqual([])
    expect(await rollUpUsage()).toBeUndefined()
  })

  it("equal the ledger for every account once all hours are summed", async () => {
    await superuser.query("update usage_rollup set rolled_until = null")
    await rollUpUsage()
    const { rows } = await superuser.query(
      `with span as (select rolled_until from usage_rollup),
        l as (select account_id, mode, sum(units) as units from usage_event, span where at < rolled_until group by 1, 2),
        h as (select account_id, mode, sum(units) as units from usage_hour, span where hour < rolled_until group by 1, 2)
       select count(*)::int as accounts, count(*) filter (where l.units is distinct from h.units)::int as wrong
         from l full join h using (account_id, mode)`,
    )
    expect(rows[0].accounts).toBeGreaterThanOrEqual(2)
    expect(rows[0].wrong).toBe(0)
  })
})

describe("the comparison of ledger, sums and counters", () => {
  const call = ({ ctx }: TestAccount) =>
    commitUsage({
      account_id: ctx.account_id,
      key_id: "key_a",
      mode: "live",
      operation: "carbonateCo2",
      calls: 1,
      units: 1,
      request_id: newId("request"),
    })
  const driftOf = async ({ ctx }: TestAccount): Promise<Drift[]> =>
    (await reconcileUsage()).filter(({ account_id }) => account_id === ctx.account_id)

  it("finds nothing where all three agree, and each unit by which one differs", async () => {
    const account = await createTestAccount()
    const hour = await hourAgo(3)
    for (let made = 0; made < 3; made++) await call(account)
    expect(await driftOf(account)).toEqual([])

    await writeLedger(account, [{ at: hour, mode: "sandbox" }])
    await unroll(5)
    await rollUpUsage()
    await superuser.query("update usage_hour set units = units + 1 where account_id = $1", [
      account.ctx.account_id,
    ])
    await superuser.query(
      "update usage_counter set units = units - 1 where account_id = $1 and mode = 'live'",
      [account.ctx.account_id],
    )
    const drift = await driftOf(account)
    expect(drift).toMatchObject([
      { between: "ledger and hour", mode: "sandbox", start: hour, ledger_units: 1, other_units: 2 },
      { between: "ledger and counter", mode: "live", ledger_units: 3, other_units: 2 },
    ])
    expect(describeDrift(drift[0]!)).toBe(
      `usage drift: account ${account.ctx.account_id}, sandbox, hour of ${hour.toISOString()}: ` +
        "the ledger has 1 units, the hour 2",
    )
  })

  it("finds an hour that was never summed, and a sum that no call stands behind", async () => {
    const account = await createTestAccount()
    const [one, other] = [await hourAgo(4), await hourAgo(3)]
    await unroll(1)
    await rollUpUsage()
    await writeLedger(account, [{ at: one, mode: "sandbox" }])
    await superuser.query(
      `insert into usage_hour (account_id, hour, mode, operation, key_id, calls, units)
       values ($1, $2, 'sandbox', 'carbonateCo2', 'key_a', 1, 1)`,
      [account.ctx.account_id, other],
    )
    expect((await driftOf(account)).filter(({ between }) => between === "ledger and hour")).toMatchObject([
      { start: one, ledger_units: 1, other_units: 0 },
      { start: other, ledger_units: 0, other_units: 1 },
    ])
  })

  it("is not misled when a subscription moves the period while calls come in", async () => {
    const account = await createTestAccount()
    const { account_id } = account.ctx
    for (let made = 0; made < 3; made++) await call(account)
    // The new period begins a moment ago: calls of that moment stand in the counter of the month.
    await asWorker((trx) =>
      trx
        .updateTable("account")
        .set({ period_anchor: new Date(Date.now() - 60_000) })
        .where("id", "=", account_id)
        .execute(),
    )
    for (let made = 0; made < 2; made++) await call(account)
    const counters = await withTenant(account_id, (trx) =>
      trx.selectFrom("usage_counter").selectAll().where("account_id", "=", account_id).execute(),
    )
    expect(counters.map(({ units }) => units).sort()).toEqual([2, 3])
    expect(await driftOf(account)).toEqual([])
  })
})
