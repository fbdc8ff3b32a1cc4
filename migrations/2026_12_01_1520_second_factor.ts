import { type Kysely, sql } from "kysely"

/** The second factor of a person, and the recovery codes that stand in for it. They belong to no tenant. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  `create table second_factor (
    user_id text primary key references app_user on delete cascade,
    seed bytea not null,
    last_step bigint not null default 0,
    created_at timestamptz not null default now(),
    confirmed_at timestamptz
  )`,
  `create table recovery_code (
    user_id text not null references app_user on delete cascade,
    digest bytea not null,
    used_at timestamptz,
    primary key (user_id, digest)
  )`,
  `grant select, insert, update, delete on second_factor, recovery_code to tarnwright_app`,
  `grant select, delete on second_factor, recovery_code to tarnwright_worker`,
]
