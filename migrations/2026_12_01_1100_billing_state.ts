import { type Kysely, sql } from "kysely"

/** Since when a subscription owes money: seven days later the account may spend no more than its plan includes. */
export async function up(db: Kysely<never>): Promise<void> {
  await sql`alter table subscription add column past_due_since timestamptz`.execute(db)
  // The worker looks for accounts by the customer that an event names; events that wait are few.
  await sql`create index stripe_event_waiting on stripe_event (received_at) where processed_at is null`.execute(
    db,
  )
}
