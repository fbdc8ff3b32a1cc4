import { sql } from "kysely"
import { asWorker, type KeyMode } from "@/db"

/** Two records of the same usage that differ. Units of the ledger are what was acknowledged. */
export interface Drift {
  readonly between: "ledger and hour" | "ledger and counter"
  readonly account_id: string
  readonly mode: KeyMode
  /** First instant of the hour or of the period. */
  readonly start: Date
  readonly ledger_units: number
  readonly other_units: number
}

/** The line that the log has for a difference; an operator's alarm looks for its first two words. */
export function describeDrift({
  between,
  account_id,
  mode,
  start,
  ledger_units,
  other_units,
}: Drift): string {
  const [, other] = between.split(" and ")
  return (
    `usage drift: account ${account_id}, ${mode}, ${other} of ${start.toISOString()}: ` +
    `the ledger has ${ledger_units} units, the ${other} ${other_units}`
  )
}

/** Days back to which hours and ended periods are compared: a run a day sees each of them more than once. */
const REACH_DAYS = 3

/**
 * Compares the ledger with the hourly sums and with the counters. @source PLATFORM 3.1, invariant D
 *
 * @returns every difference; none means that all is well
 */
export async function reconcileUsage(): Promise<Drift[]> {
  return asWorker(async (trx) => {
    const hours = await sql<Drift>`
      with span as (
        select date_trunc('hour', now() - make_interval(days => ${REACH_DAYS}), 'UTC') as first, rolled_until as last
          from usage_rollup
      ), ledger as (
        select account_id, mode, operation, key_id, date_trunc('hour', at, 'UTC') as start, sum(calls) as calls,
               sum(units) as units
          from usage_event, span where at >= first and at < last group by 1, 2, 3, 4, 5
      ), hourly as (
        select account_id, mode, operation, key_id, hour as start, calls, units
          from usage_hour, span where hour >= first and hour < last
      )
      select 'ledger and hour' as between, account_id, mode, start,
             coalesce(sum(ledger.units), 0) as ledger_units, coalesce(sum(hourly.units), 0) as other_units
        from ledger full join hourly using (account_id, mode, operation, key_id, start)
       where ledger.calls is distinct from hourly.calls or ledger.units is distinct from hourly.units
       group by 2, 3, 4 order by 2, 3, 4`.execute(trx)
    // When a subscription moves the period, the old one and the new one overlap, and only their sum can be compared.
    const periods = await sql<Drift>`
      with ordered as (
        select *, max(period_end) over (partition by account_id, mode order by period_start
                    rows between unbounded preceding and 1 preceding) as covered_until
          from usage_counter
      ), numbered as (
        select *, count(*) filter (where covered_until is null or covered_until <= period_start)
                    over (partition by account_id, mode order by period_start) as stretch
          from ordered
      ), stretches as (
        select account_id, mode, min(period_start) as start, max(period_end) as finish, sum(units) as units
          from numbered group by account_id, mode, stretch
        having max(period_end) > now() - make_interval(days => ${REACH_DAYS})
      )
      select 'ledger and counter' as between, s.account_id, s.mode, s.start,
             coalesce(l.units, 0) as ledger_units, s.units as other_units
        from stretches s
        left join lateral (
          select sum(e.units) as units from usage_event e
           where e.account_id = s.account_id and e.mode = s.mode and e.at >= s.start and e.at < s.finish) l on true
       where coalesce(l.units, 0) <> s.units
       order by 2, 3, 4`.execute(trx)
    return [...hours.rows, ...periods.rows]
  })
}
