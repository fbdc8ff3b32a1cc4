import { sql } from "kysely"
import { asWorker } from "@/db"

/** Days for which the ledger has a partition ahead. @source PLATFORM 8.4 */
const AHEAD_DAYS = 14

/** Days for which the ledger is kept. @source PLATFORM 3.7 */
const KEPT_DAYS = 400

/** Makes the ledger's partitions for today and the days ahead; those that there are stay as they are. */
export async function makePartitions(): Promise<void> {
  await asWorker((trx) =>
    sql`select make_usage_partitions((now() at time zone 'UTC')::date,
      (now() at time zone 'UTC')::date + ${AHEAD_DAYS}::integer)`.execute(trx),
  )
}

/**
 * Drops the ledger's partitions that are older than it is kept.
 *
 * @returns how many
 */
export async function dropOldPartitions(): Promise<number> {
  const { rows } = await asWorker((trx) =>
    sql<{ dropped: number }>`
      select drop_usage_partitions((now() at time zone 'UTC')::date - ${KEPT_DAYS}::integer) as dropped`.execute(
      trx,
    ),
  )
  return rows[0]?.dropped ?? 0
}
