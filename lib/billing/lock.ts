import { sql } from "kysely"
import type { Trx } from "@/db"

/**
 * Waits until no other transaction works on the account's billing, and keeps others out until this one ends. What is
 * then fetched from Stripe is newer than anything that another has written, so the order of events does not matter.
 */
export async function lockBilling(trx: Trx, account_id: string): Promise<void> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`billing:${account_id}`}, 0))`.execute(trx)
}
