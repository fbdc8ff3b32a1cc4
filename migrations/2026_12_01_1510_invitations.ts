import { type Kysely, sql } from "kysely"

/** Who is invited into an account and as what. The newest letter's token counts, by its digest. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  `create table invitation (
    account_id text not null references account on delete cascade,
    id text not null unique,
    email text not null check (email = lower(email)),
    role text not null check (role in ('owner', 'developer', 'merchandiser', 'viewer')),
    token_digest bytea not null unique,
    invited_by text not null,
    created_at timestamptz not null default now(),
    expires_at timestamptz not null,
    primary key (account_id, id),
    unique (account_id, email)
  )`,
  `alter table invitation enable row level security`,
  `alter table invitation force row level security`,
  `create policy tenant on invitation to tarnwright_app
    using (account_id = current_setting('app.account', true))
    with check (account_id = current_setting('app.account', true))`,
  `create policy worker on invitation to tarnwright_worker using (true) with check (true)`,
  `grant select, insert, update, delete on invitation to tarnwright_app`,
  `grant select, delete on invitation to tarnwright_worker`,
  `delete from one_time_token where purpose = 'invite'`,
  `alter table one_time_token drop constraint one_time_token_purpose_check`,
  `alter table one_time_token add constraint one_time_token_purpose_check
    check (purpose in ('verify_email', 'reset_password', 'sign_in'))`,
]
