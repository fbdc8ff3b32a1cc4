import { type Kysely, sql } from "kysely"

/** Outgoing webhooks: where they go and what became of each. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const tables = [
  // Secrets are sealed by the application (AES-256-GCM): the database alone cannot sign.
  `create table webhook_endpoint (
    account_id text not null references account on delete cascade,
    id text not null unique,
    url text not null,
    events text[] not null,
    secret bytea not null,
    previous_secret bytea,
    previous_secret_until timestamptz,
    created_at timestamptz not null default now(),
    updated_at timestamptz not null default now(),
    disabled_at timestamptz,
    disabled_reason text check (disabled_reason in ('paused', 'gone')),
    primary key (account_id, id)
  )`,
  // The payload is text, since a signature covers bytes and a repeated attempt sends the same ones.
  `create table webhook_delivery (
    account_id text not null,
    id text not null unique,
    endpoint_id text not null,
    event_id text not null,
    type text not null,
    payload text not null check (octet_length(payload) < 20480),
    status text not null default 'pending' check (status in ('pending', 'delivered', 'failed')),
    attempts integer not null default 0,
    created_at timestamptz not null default now(),
    next_attempt_at timestamptz default now(),
    claimed_until timestamptz,
    last_attempt_at timestamptz,
    last_status integer,
    last_failure text,
    last_duration_ms integer,
    primary key (account_id, id),
    foreign key (account_id, endpoint_id) references webhook_endpoint on delete cascade
  )`,
  `create index webhook_delivery_by_endpoint on webhook_delivery (account_id, endpoint_id, id desc)`,
  `create index webhook_delivery_waiting on webhook_delivery (next_attempt_at) where status = 'pending'`,
  `create index webhook_delivery_by_time on webhook_delivery (created_at)`,
]

const security = ["webhook_endpoint", "webhook_delivery"].flatMap((table) => [
  `alter table ${table} enable row level security`,
  `alter table ${table} force row level security`,
  `create policy tenant on ${table} to tarnwright_app
    using (account_id = current_setting('app.account', true))
    with check (account_id = current_setting('app.account', true))`,
  `create policy worker on ${table} to tarnwright_worker using (true) with check (true)`,
  `create policy admin_reads on ${table} for select to tarnwright_admin using (true)`,
])

const rights = [
  `grant select, insert, update, delete on webhook_endpoint, webhook_delivery to tarnwright_app, tarnwright_worker`,
  // The admin revokes keys, which is an event; no secret and no payload is theirs to read.
  `grant select (account_id, id, url, events, created_at, updated_at, disabled_at, disabled_reason)
    on webhook_endpoint to tarnwright_admin`,
  `grant select (account_id, id, endpoint_id, event_id, type, status, attempts, created_at, next_attempt_at,
    last_attempt_at, last_status, last_failure, last_duration_ms) on webhook_delivery to tarnwright_admin`,
  `grant insert on webhook_delivery to tarnwright_admin`,
  `create policy admin_writes on webhook_delivery for insert to tarnwright_admin with check (true)`,
]

const jobs = [
  // A job may wait until a time, and jobs of one queue run one after another.
  `drop function enqueue_job(text, json, text)`,
  `create function enqueue_job(p_task text, p_payload json, p_job_key text default null,
      p_run_at timestamptz default null, p_queue text default null) returns void
    language sql security definer set search_path = public, pg_temp as $$
    select graphile_worker.add_job(p_task, p_payload, job_key => p_job_key, run_at => p_run_at, queue_name => p_queue)
  $$`,
  `revoke execute on function enqueue_job(text, json, text, timestamptz, text) from public`,
  `grant execute on function enqueue_job(text, json, text, timestamptz, text)
    to tarnwright_app, tarnwright_worker, tarnwright_admin`,
]

const statements = [...tables, ...security, ...rights, ...jobs]
