import { type Kysely, sql } from "kysely"

/** What the throttle of sign-in and the limit of letters an hour look up on every try. */
export async function up(db: Kysely<never>): Promise<void> {
  await sql`create index sign_in_failure_by_ip on sign_in_failure (ip, at)`.execute(db)
  await sql`create index one_time_token_by_email on one_time_token (email, created_at)`.execute(db)
}
