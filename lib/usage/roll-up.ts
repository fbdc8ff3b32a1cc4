import { sql } from "kysely"
import { asWorker } from "@/db"

/** Hours that were summed in a run: from the first to before the second. */
export interface RolledHours {
  readonly from: Date
  readonly until: Date
}

/**
 * Sums each hour that has closed since the last run, by account, mode, operation and key.
 *
 * An hour closes ten minutes after its end, when no call of it can still be on its way into the ledger. The sums are
 * absolute, so that a run which is repeated changes nothing. @source PLATFORM 3.7
 *
 * @returns undefined when no hour has closed
 */
export async function rollUpUsage(): Promise<RolledHours | undefined> {
  return asWorker(async (trx) => {
    const { rows } = await sql<{ from: Date | null; until: Date }>`
      select coalesce(rolled_until, (select date_trunc('hour', min(at), 'UTC') from usage_event)) as "from",
             date_trunc('hour', now() - interval '10 minutes', 'UTC') as until
        from usage_rollup for update`.execute(trx)
    const [span] = rows
    if (!span?.from || span.from >= span.until) return undefined
    const { from, until } = span
    await sql`
      insert into usage_hour (account_id, hour, mode, operation, key_id, calls, units)
        select account_id, date_trunc('hour', at, 'UTC'), mode, operation, key_id, sum(calls), sum(units)
          from usage_event where at >= ${from} and at < ${until}
         group by 1, 2, 3, 4, 5
      on conflict (account_id, hour, mode, operation, key_id)
        do update set calls = excluded.calls, units = excluded.units`.execute(trx)
    await trx.updateTable("usage_rollup").set({ rolled_until: until }).execute()
    return { from, until }
  })
}
