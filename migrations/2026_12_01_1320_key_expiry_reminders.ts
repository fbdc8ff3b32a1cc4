import { type Kysely, sql } from "kysely"

/** Which reminders of a key's end were sent; a key whose end is moved is reminded of anew. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  `create table key_reminder (
    account_id text not null,
    key_id text not null,
    expires_at timestamptz not null,
    days_before integer not null,
    sent_at timestamptz not null default now(),
    primary key (account_id, key_id, expires_at, days_before),
    foreign key (account_id, key_id) references api_key on delete cascade
  )`,
  `alter table key_reminder enable row level security`,
  `alter table key_reminder force row level security`,
  `create policy worker on key_reminder to tarnwright_worker using (true) with check (true)`,
  `grant select, insert, delete on key_reminder to tarnwright_worker`,
  `create index api_key_by_end on api_key (expires_at) where expires_at is not null and revoked_at is null`,
]
