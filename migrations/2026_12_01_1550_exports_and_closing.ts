import { type Kysely, sql } from "kysely"

/** Archives of an account's data for its owners, and the end of an account. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  `create table account_export (
    account_id text not null references account on delete cascade,
    id text not null unique,
    requested_by text not null,
    requested_at timestamptz not null default now(),
    finished_at timestamptz,
    expires_at timestamptz not null,
    archive bytea,
    primary key (account_id, id)
  )`,
  `alter table account_export enable row level security`,
  `alter table account_export force row level security`,
  `create policy tenant on account_export to tarnwright_app
    using (account_id = current_setting('app.account', true))
    with check (account_id = current_setting('app.account', true))`,
  `create policy worker on account_export to tarnwright_worker using (true) with check (true)`,
  `grant select, insert on account_export to tarnwright_app`,
  `grant select, update, delete on account_export to tarnwright_worker`,
  // What names its account without hanging on it is deleted by the worker, and only of an account that closes.
  `alter table account add column closing_since timestamptz`,
  `create policy only_of_closing on audit_log as restrictive for delete to tarnwright_worker
    using (exists (select from account a where a.id = account_id and a.status = 'closing'))`,
  `create policy only_of_closing on usage_event as restrictive for delete to tarnwright_worker
    using (exists (select from account a where a.id = account_id and a.status = 'closing'))`,
  `grant delete on audit_log, usage_event to tarnwright_worker`,
]
