import { asWorker } from "@/db"
import { ensureMeter } from "./ensure-prices"
import { stripe } from "./stripe-client"

/** Name of the daily job; `scripts/worker.ts` has its task and its hour. */
export const COMPARE_OVERAGE = "compare_overage"

/** An hour for which Stripe counts another number of units than we reported. */
export interface OverageDifference {
  readonly account_id: string
  readonly hour: Date
  readonly ours: number
  readonly theirs: number
}

const HOUR_S = 3600
/** Stripe's sums are a while behind its readings. */
const SETTLED_AFTER_S = 2 * HOUR_S
const REACH_S = 35 * 86_400

/** Compares what we reported in the last 35 days with what Stripe counts. @source PLATFORM 3.14 */
export async function compareOverage({ now }: { now: Date }): Promise<OverageDifference[]> {
  const until = Math.floor(now.getTime() / 1000 / HOUR_S) * HOUR_S - SETTLED_AFTER_S
  const since = until - REACH_S
  const reports = await asWorker((trx) =>
    trx
      .selectFrom("overage_report")
      .innerJoin("account", "account.id", "overage_report.account_id")
      .select(["overage_report.account_id", "hour", "units", "account.stripe_customer_id as customer"])
      .where("hour", ">=", new Date(since * 1000))
      .where("hour", "<", new Date(until * 1000))
      .where("delivered_at", "is not", null)
      .orderBy("overage_report.account_id")
      .orderBy("hour")
      .execute(),
  )
  const meter = reports.length > 0 ? await ensureMeter() : ""
  const differences: OverageDifference[] = []
  const accounts = new Map(reports.map(({ account_id, customer }) => [account_id, customer]))
  for (const [account_id, customer] of accounts) {
    if (!customer) continue
    const theirs = await summaries(meter, customer, since, until)
    const hours = reports.filter((report) => report.account_id === account_id)
    const ours = new Map(hours.map(({ hour, units }) => [hour.getTime() / 1000, units]))
    for (const start of new Set([...ours.keys(), ...theirs.keys()])) {
      const pair = { ours: ours.get(start) ?? 0, theirs: theirs.get(start) ?? 0 }
      if (pair.ours !== pair.theirs) differences.push({ account_id, hour: new Date(start * 1000), ...pair })
    }
  }
  return differences
}

/** Units by the hour, as Stripe counts them. */
async function summaries(
  meter: string,
  customer: string,
  from: number,
  to: number,
): Promise<Map<number, number>> {
  const found = new Map<number, number>()
  const list = stripe().billing.meters.listEventSummaries(meter, {
    customer,
    start_time: from,
    end_time: to,
    value_grouping_window: "hour",
    limit: 100,
  })
  for await (const { start_time, aggregated_value } of list) found.set(start_time, aggregated_value)
  return found
}
