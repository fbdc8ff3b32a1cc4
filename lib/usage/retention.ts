import { sql } from "kysely"
import { asWorker } from "@/db"
import { REMEMBERED_H } from "./idempotency"
import { LOG_DAYS } from "./list-calls"

/** Days for which a shopper's enquiry is kept, as the shopper is told before they agree. @source PLATFORM 4.16 */
export const ENQUIRY_DAYS = 180

/**
 * What is deleted and when: one row a table. The ledger goes by partitions, the hourly sums and the audit trail stay.
 *
 * @source PLATFORM 1.12, 3.7, 5.2, 5.5; Stripe sends an event again for up to three days; the rest is our choice
 */
const retention = {
  refused_call: `at < now() - interval '${LOG_DAYS} days'`,
  idempotency: `claimed_at < now() - interval '${REMEMBERED_H} hours'`,
  webhook_delivery: "created_at < now() - interval '30 days'",
  session: "expires_at < now()",
  one_time_token: "expires_at < now() - interval '7 days'",
  account_export: "expires_at < now()",
  invitation: "expires_at < now() - interval '30 days'",
  sign_in_failure: "at < now() - interval '30 days'",
  stripe_event: "processed_at < now() - interval '90 days'",
  usage_counter: "mode = 'sandbox' and period_end < now() - interval '35 days'",
  usage_threshold: "period_end < now() - interval '400 days'",
  key_reminder: "expires_at < now() - interval '30 days'",
  enquiry: `created_at < now() - interval '${ENQUIRY_DAYS} days'`,
  tank_event: "day < current_date - 400",
} as const

export type Retained = keyof typeof retention

/** Rows that one transaction deletes at most, so that none holds its locks for long. */
const batch = 5_000

/**
 * Deletes what is older than it is kept.
 *
 * @returns how many rows of each table
 */
export async function deleteExpired(): Promise<Record<Retained, number>> {
  const deleted = {} as Record<Retained, number>
  for (const table of Object.keys(retention) as Retained[]) deleted[table] = await empty(table)
  return deleted
}

async function empty(table: Retained): Promise<number> {
  for (let total = 0; ; ) {
    const { numAffectedRows = 0n } = await asWorker((trx) =>
      sql`delete from ${sql.table(table)} where ctid = any (array(
        select ctid from ${sql.table(table)} where ${sql.raw(retention[table])} limit ${batch}))`.execute(
        trx,
      ),
    )
    total += Number(numAffectedRows)
    if (numAffectedRows < batch) return total
  }
}
