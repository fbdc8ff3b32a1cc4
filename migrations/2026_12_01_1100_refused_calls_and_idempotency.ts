import { type Kysely, sql } from "kysely"

/** What the request log keeps of refused calls, and the answers that an idempotency key gives again. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  // Calls that succeeded stand in the ledger; no body of any call is kept.
  `create table refused_call (
    account_id text not null references account on delete cascade,
    id text not null,
    at timestamptz not null default now(),
    key_id text not null,
    mode text not null,
    method text not null,
    path text not null,
    status integer not null,
    code text not null,
    detail text not null,
    errors jsonb not null default '[]',
    primary key (account_id, at, id)
  )`,
  `create index refused_call_by_time on refused_call (at)`,
  `create table idempotency (
    account_id text not null references account on delete cascade,
    mode text not null,
    key text not null,
    fingerprint bytea not null,
    claimed_at timestamptz not null default now(),
    status integer,
    body text,
    primary key (account_id, mode, key)
  )`,
  `create index idempotency_by_time on idempotency (claimed_at)`,
  ...["refused_call", "idempotency"].flatMap((table) => [
    `alter table ${table} enable row level security`,
    `alter table ${table} force row level security`,
    `create policy tenant on ${table} to tarnwright_app
      using (account_id = current_setting('app.account', true))
      with check (account_id = current_setting('app.account', true))`,
    `create policy worker on ${table} to tarnwright_worker using (true) with check (true)`,
  ]),
  `grant select on refused_call to tarnwright_app`,
  `grant select, insert, update, delete on idempotency to tarnwright_app`,
  `grant select, delete on refused_call, idempotency to tarnwright_worker`,
  `grant insert on refused_call to tarnwright_meter`,
  `create policy meter on refused_call for insert to tarnwright_meter with check (true)`,
  `grant create on schema public to tarnwright_meter`,
  `create function log_refusals(p_rows jsonb) returns void
    language sql security definer set search_path = public, pg_temp as $$
    insert into refused_call (account_id, id, key_id, mode, method, path, status, code, detail, errors)
    select * from jsonb_to_recordset(p_rows) as r (account_id text, id text, key_id text, mode text, method text,
      path text, status integer, code text, detail text, errors jsonb)
  $$`,
  `alter function log_refusals(jsonb) owner to tarnwright_meter`,
  `revoke create on schema public from tarnwright_meter`,
  `revoke execute on function log_refusals(jsonb) from public`,
  `grant execute on function log_refusals(jsonb) to tarnwright_app`,
]
