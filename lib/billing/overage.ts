import { sql } from "kysely"
import type { Trx } from "@/db"

/** Units beyond the plan in one hour. */
export interface OverageHour {
  readonly hour: Date
  readonly units: number
  readonly included_units: number
}

/**
 * Units beyond the plan for each hour of a period, from the ledger, up to a moment.
 *
 * An hour belongs to the period in which it begins; what a period spends before its first full hour counts in that
 * one. So no hour is shared by two periods, and what is reported for it is billed with the right one. Of an hour that
 * was reported before, the units included then still count.
 */
export async function overageHours(
  trx: Trx,
  period: { readonly account_id: string; readonly period_start: Date; readonly period_end: Date },
  included_units: number,
  until: Date,
): Promise<OverageHour[]> {
  const { account_id, period_start, period_end } = period
  const { rows } = await sql<OverageHour>`
    with spent as (
      select greatest(date_trunc('hour', at, 'UTC'),
                      date_trunc('hour', ${period_start}::timestamptz + interval '1 hour' - interval '1 microsecond', 'UTC')) as hour,
             sum(units) as units
        from usage_event
       where account_id = ${account_id} and mode = 'live'
         and at >= ${period_start} and at < least(${period_end}::timestamptz, ${until}::timestamptz)
       group by 1
    ), running as (
      select s.hour, s.units, sum(s.units) over (order by s.hour) as total,
             coalesce(r.included_units, ${included_units}::bigint) as included
        from spent s left join overage_report r on r.account_id = ${account_id} and r.hour = s.hour
    )
    select hour, included as included_units,
           (greatest(0, total - included) - greatest(0, total - units - included))::bigint as units
      from running where total > included order by hour`.execute(trx)
  return rows
}
