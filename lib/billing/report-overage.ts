import Stripe from "stripe"
import { asWorker, enqueueJob, type Trx } from "@/db"
import { CUSTOMER_KEY, ensureMeter, OVERAGE_EVENT, UNITS_KEY } from "./ensure-prices"
import { lockBilling } from "./lock"
import { overageHours } from "./overage"
import { planOf } from "./plans"
import { stripe } from "./stripe-client"

/** Name of the job that reports units beyond the plan; `scripts/worker.ts` has its task and its hours. */
export const REPORT_METER_HOURS = "report_meter_hours"

/** After this a call can no longer be on its way into the ledger; one that were would be reported by the next run. */
const SETTLED_AFTER_MS = 2 * 60_000
/** How long an ended period is still looked at. Stripe takes readings for 35 days. */
const REACH_MS = 2 * 86_400_000

/** Reports the account once its last calls have settled: a renewal's invoice waits an hour for them. */
export async function reportSoon(trx: Trx, account_id: string, now: Date): Promise<void> {
  await enqueueJob(trx, {
    task: REPORT_METER_HOURS,
    payload: { account_id },
    key: `${REPORT_METER_HOURS}:${account_id}`,
    run_at: new Date(now.getTime() + SETTLED_AFTER_MS),
  })
}

/**
 * Reports to Stripe how many units beyond its plan an account, or every account, spent in each hour.
 *
 * What is sent is the hour's whole total and never a difference, under a name that says account, hour and revision: a
 * total that is sent twice counts once, and one that has grown replaces the former. @source PLATFORM 3.11 to 3.13
 *
 * @throws AggregateError when some could not be reported; the others are, and the next run makes up for these
 */
export async function reportOverage({ account_id, now }: { account_id?: string; now: Date }): Promise<void> {
  const until = new Date(now.getTime() - SETTLED_AFTER_MS)
  const problems: unknown[] = []
  for (const account of await billedAccounts(now, account_id)) {
    await reportAccount(account, until).catch((error) => problems.push(error))
  }
  if (problems.length > 0)
    throw new AggregateError(problems, `${problems.length} accounts could not be reported`)
}

interface BilledAccount {
  readonly account_id: string
  readonly customer: string
  readonly plan: string
  readonly period_anchor: Date
}

/** Accounts with a subscription whose periods are ours to bill. */
async function billedAccounts(now: Date, only: string | undefined): Promise<BilledAccount[]> {
  const rows = await asWorker((trx) =>
    trx
      .selectFrom("subscription")
      .innerJoin("account", "account.id", "subscription.account_id")
      .select(["account.id as account_id", "account.stripe_customer_id as customer"])
      .select(["subscription.plan", "account.period_anchor"])
      .where("subscription.status", "not in", ["canceled", "incomplete", "incomplete_expired"])
      .where("subscription.current_period_end", ">", new Date(now.getTime() - REACH_MS))
      .$if(only !== undefined, (query) => query.where("account.id", "=", only!))
      .execute(),
  )
  return rows.flatMap(({ customer, period_anchor, ...row }) =>
    customer && period_anchor ? [{ ...row, customer, period_anchor }] : [],
  )
}

async function reportAccount(account: BilledAccount, until: Date): Promise<void> {
  await asWorker((trx) => noteHours(trx, account, until))
  const { account_id } = account
  const waiting = await asWorker((trx) =>
    trx
      .selectFrom("overage_report")
      .select(["hour", "units", "revision"])
      .where("account_id", "=", account_id)
      .where("delivered_at", "is", null)
      .orderBy("hour")
      .execute(),
  )
  if (waiting.length === 0) return
  await ensureMeter()
  for (const row of waiting) {
    await send({ ...account, ...row })
    await asWorker((trx) =>
      trx
        .updateTable("overage_report")
        .set({ delivered_at: new Date() })
        .where("account_id", "=", account_id)
        .where("hour", "=", row.hour)
        .where("revision", "=", row.revision)
        .execute(),
    )
  }
}

/** Writes down what each hour comes to; an hour whose total has changed waits to be sent under its next revision. */
async function noteHours(trx: Trx, account: BilledAccount, until: Date): Promise<void> {
  const { account_id, plan, period_anchor } = account
  await lockBilling(trx, account_id)
  const { included_units } = planOf(plan)
  const periods = await trx
    .selectFrom("usage_counter")
    .select(["account_id", "period_start", "period_end"])
    .where("account_id", "=", account_id)
    .where("mode", "=", "live")
    .where("period_start", ">=", period_anchor)
    .where("period_end", ">", new Date(until.getTime() - REACH_MS))
    .where("units", ">", 0)
    .execute()
  for (const period of periods) {
    const hours = await overageHours(trx, period, included_units, until)
    if (hours.length === 0) continue
    await trx
      .insertInto("overage_report")
      .values(hours.map((hour) => ({ account_id, ...hour, delivered_at: null })))
      .onConflict((conflict) =>
        conflict
          .columns(["account_id", "hour"])
          .doUpdateSet((set) => ({
            units: set.ref("excluded.units"),
            revision: set("overage_report.revision", "+", 1),
            delivered_at: null,
          }))
          .whereRef("overage_report.units", "is distinct from", "excluded.units"),
      )
      .execute()
  }
}

async function send(hour: {
  account_id: string
  customer: string
  hour: Date
  units: number
  revision: number
}): Promise<void> {
  const start = Math.floor(hour.hour.getTime() / 1000)
  try {
    await stripe().billing.meterEvents.create({
      event_name: OVERAGE_EVENT,
      identifier: `${hour.account_id}:${start}:r${hour.revision}`,
      // Within an hour Stripe keeps the newest reading, and a later revision is newer by a second.
      timestamp: start + hour.revision,
      payload: { [CUSTOMER_KEY]: hour.customer, [UNITS_KEY]: String(hour.units) },
    })
  } catch (error) {
    if (!isKnown(error)) throw error
  }
}

/** A reading that arrived before, its answer lost, is refused and not swallowed; it has arrived all the same. */
function isKnown(error: unknown): boolean {
  return (
    error instanceof Stripe.errors.StripeInvalidRequestError &&
    error.headers?.["stripe-should-retry"] === "false" &&
    /identifier/i.test(error.message)
  )
}
