import { type Kysely, sql } from "kysely"

/** The smaller plan that a subscription goes to when its period ends. */
export async function up(db: Kysely<never>): Promise<void> {
  await sql`alter table subscription add column scheduled_plan text`.execute(db)
}
