import { type Kysely, sql } from "kysely"

/**
 * Accounts, people, keys, usage, billing, widgets, audit.
 *
 * `account_id` leads every tenant key. Row-level security is forced on tenant tables: the application role sees the
 * account named by `app.account` in its transaction, or what the person named by `app.user` belongs to.
 */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const identity = [
  `create table account (
    id text primary key,
    slug text not null unique check (slug ~ '^[a-z0-9](-?[a-z0-9]){1,38}$'),
    name text not null,
    plan text not null default 'nano',
    unit_cap bigint not null default 1000 check (unit_cap >= 0),
    period_anchor timestamptz,
    overage_cap_minor integer not null default 0 check (overage_cap_minor >= 0),
    status text not null default 'active' check (status in ('active', 'suspended', 'closing')),
    status_reason text,
    stripe_customer_id text unique,
    created_at timestamptz not null default now()
  )`,
  `create table app_user (
    id text primary key,
    email text not null unique check (email = lower(email)),
    name text not null,
    password_hash text,
    email_verified_at timestamptz,
    is_admin boolean not null default false,
    preferences jsonb not null default '{}',
    created_at timestamptz not null default now()
  )`,
  `create table membership (
    account_id text not null references account on delete cascade,
    user_id text not null references app_user on delete cascade,
    role text not null check (role in ('owner', 'developer', 'merchandiser', 'viewer')),
    created_at timestamptz not null default now(),
    primary key (account_id, user_id)
  )`,
  `create index membership_by_user on membership (user_id)`,
  `create table session (
    token_digest bytea primary key,
    id text not null unique,
    user_id text not null references app_user on delete cascade,
    created_at timestamptz not null default now(),
    last_seen_at timestamptz not null default now(),
    expires_at timestamptz not null,
    stepped_up_at timestamptz,
    ip text,
    user_agent text
  )`,
  `create index session_by_user on session (user_id)`,
  `create table one_time_token (
    digest bytea primary key,
    purpose text not null check (purpose in ('verify_email', 'reset_password', 'sign_in', 'invite')),
    email text not null,
    payload jsonb not null default '{}',
    created_at timestamptz not null default now(),
    expires_at timestamptz not null,
    used_at timestamptz
  )`,
  `create table sign_in_failure (
    id bigint generated always as identity primary key,
    email text not null,
    ip text,
    at timestamptz not null default now()
  )`,
  `create index sign_in_failure_by_email on sign_in_failure (email, at)`,
]

const keys = [
  `create table api_key (
    account_id text not null references account on delete cascade,
    id text not null unique,
    kind text not null check (kind in ('server', 'browser')),
    mode text not null check (mode in ('live', 'sandbox')),
    name text not null,
    digest bytea not null unique,
    pepper_version integer not null,
    last4 text not null,
    scopes text[] not null,
    origins text[] not null default '{}',
    cidrs text[] not null default '{}',
    created_by text,
    created_at timestamptz not null default now(),
    expires_at timestamptz,
    last_used_at timestamptz,
    revoked_at timestamptz,
    revoked_by text,
    revoked_reason text,
    successor_id text,
    primary key (account_id, id)
  )`,
  // A trigger and not the verb, so that no way of changing a key or an account leaves a cache behind.
  `create function announce_key_change() returns trigger language plpgsql as $$
  begin
    perform pg_notify('access_changed', 'key:' || new.id);
    return null;
  end $$`,
  `create trigger key_change after insert or update of scopes, origins, cidrs, expires_at, revoked_at, digest
    on api_key for each row execute function announce_key_change()`,
  `create function announce_account_change() returns trigger language plpgsql as $$
  begin
    perform pg_notify('access_changed', 'account:' || new.id);
    return null;
  end $$`,
  `create trigger account_change after update of plan, unit_cap, status, period_anchor, overage_cap_minor
    on account for each row execute function announce_account_change()`,
]

const usage = [
  `create table usage_event (
    account_id text not null,
    at timestamptz not null default now(),
    id text not null,
    key_id text not null,
    mode text not null,
    operation text not null,
    units integer not null check (units >= 0),
    engine_version text not null,
    request_id text not null,
    primary key (account_id, at, id)
  ) partition by range (at)`,
  // Day partitions are made ahead by the worker; a row is never lost for want of one.
  `create table usage_event_default partition of usage_event default`,
  `create table usage_counter (
    account_id text not null references account on delete cascade,
    mode text not null,
    period_start timestamptz not null,
    period_end timestamptz not null,
    units bigint not null default 0,
    primary key (account_id, mode, period_start)
  )`,
  `create table usage_hour (
    account_id text not null,
    hour timestamptz not null,
    mode text not null,
    operation text not null,
    key_id text not null,
    calls bigint not null,
    units bigint not null,
    primary key (account_id, hour, mode, operation, key_id)
  )`,
  `create function make_usage_partitions(p_from date, p_to date) returns void
    language plpgsql security definer set search_path = public, pg_temp as $$
  declare
    first_day date;
  begin
    for first_day in select generate_series(p_from, p_to, interval '1 day')::date loop
      execute format('create table if not exists usage_event_%s partition of usage_event for values from (%L) to (%L)',
        to_char(first_day, 'YYYYMMDD'), first_day::timestamp at time zone 'UTC',
        (first_day + 1)::timestamp at time zone 'UTC');
    end loop;
  end $$`,
  // Sandbox units count by UTC day, live units by the subscription's month, or the calendar month without one.
  `create function metering_period(p_mode text, p_anchor timestamptz, p_now timestamptz,
      out period_start timestamptz, out period_end timestamptz)
    language plpgsql stable as $$
  declare
    months integer;
  begin
    if p_mode = 'sandbox' then
      period_start := date_trunc('day', p_now, 'UTC');
      period_end := period_start + interval '1 day';
    elsif p_anchor is null then
      period_start := date_trunc('month', p_now, 'UTC');
      period_end := (period_start at time zone 'UTC' + interval '1 month') at time zone 'UTC';
    else
      months := (extract(year from age(p_now, p_anchor)) * 12 + extract(month from age(p_now, p_anchor)))::integer;
      -- age() counts a month that ends on a shorter month's last day one day late.
      if p_anchor + make_interval(months => months + 1) <= p_now then months := months + 1; end if;
      period_start := p_anchor + make_interval(months => months);
      period_end := p_anchor + make_interval(months => months + 1);
    end if;
  end $$`,
]

const billing = [
  `create table subscription (
    account_id text primary key references account on delete cascade,
    stripe_subscription_id text not null unique,
    plan text not null,
    status text not null,
    current_period_start timestamptz not null,
    current_period_end timestamptz not null,
    cancel_at_period_end boolean not null default false,
    updated_at timestamptz not null default now()
  )`,
  `create table invoice (
    account_id text not null references account on delete cascade,
    id text not null,
    number text,
    status text not null,
    amount_minor bigint not null,
    currency text not null,
    hosted_url text,
    issued_at timestamptz not null,
    primary key (account_id, id)
  )`,
  `create table stripe_event (
    id text primary key,
    type text not null,
    payload jsonb not null,
    received_at timestamptz not null default now(),
    processed_at timestamptz
  )`,
]

const widgets = [
  `create table widget (
    account_id text not null references account on delete cascade,
    id text not null unique,
    calculator text not null,
    name text not null,
    origins text[] not null default '{}',
    settings jsonb not null default '{}',
    created_at timestamptz not null default now(),
    updated_at timestamptz not null default now(),
    disabled_at timestamptz,
    primary key (account_id, id)
  )`,
  `create function announce_widget_change() returns trigger language plpgsql as $$
  begin
    perform pg_notify('access_changed', 'key:' || new.id);
    return null;
  end $$`,
  `create trigger widget_change after update of origins, disabled_at
    on widget for each row execute function announce_widget_change()`,
]

const audit = [
  `create table audit_log (
    account_id text not null,
    id text not null,
    at timestamptz not null default now(),
    actor_kind text not null check (actor_kind in ('user', 'admin', 'key', 'system')),
    actor_id text,
    action text not null,
    target text,
    detail jsonb not null default '{}',
    ip text,
    request_id text,
    primary key (account_id, id)
  )`,
]

/** Tenant tables and the column that names the tenant. */
const tenantTables = {
  account: "id",
  membership: "account_id",
  api_key: "account_id",
  usage_event: "account_id",
  usage_counter: "account_id",
  usage_hour: "account_id",
  subscription: "account_id",
  invoice: "account_id",
  widget: "account_id",
  audit_log: "account_id",
}

const security = Object.entries(tenantTables).flatMap(([table, column]) => [
  `alter table ${table} enable row level security`,
  `alter table ${table} force row level security`,
  `create policy tenant on ${table} to tarnwright_app
    using (${column} = current_setting('app.account', true))
    with check (${column} = current_setting('app.account', true))`,
  `create policy worker on ${table} to tarnwright_worker using (true) with check (true)`,
  `create policy admin_reads on ${table} for select to tarnwright_admin using (true)`,
])

const personal = [
  `create policy own on membership for select to tarnwright_app using (user_id = current_setting('app.user', true))`,
  `create policy own on account for select to tarnwright_app using (id in (
    select m.account_id from membership m where m.user_id = current_setting('app.user', true)))`,
  `create policy admin_changes on account for update to tarnwright_admin using (true) with check (true)`,
  `create policy admin_changes on api_key for update to tarnwright_admin using (true) with check (true)`,
  `create policy admin_writes on audit_log for insert to tarnwright_admin with check (true)`,
]

const rights = [
  `grant usage on schema public to tarnwright_app, tarnwright_worker, tarnwright_admin, tarnwright_meter`,
  `grant create on schema public to tarnwright_meter`,
  `grant select, insert, update on account to tarnwright_app`,
  `grant select, insert, update, delete on app_user, membership, session, one_time_token, sign_in_failure,
    widget to tarnwright_app`,
  `grant select, insert, update on api_key to tarnwright_app`,
  `grant select on usage_event, usage_counter, usage_hour, subscription, invoice to tarnwright_app`,
  `grant select, insert on stripe_event to tarnwright_app`,
  `grant select, insert on audit_log to tarnwright_app, tarnwright_worker, tarnwright_admin`,
  `grant select, insert, update, delete on account, app_user, membership, session, one_time_token, sign_in_failure,
    api_key, usage_counter, usage_hour, subscription, invoice, stripe_event, widget to tarnwright_worker`,
  `grant select on usage_event to tarnwright_worker`,
  `grant select on account, membership, usage_event, usage_counter, usage_hour, subscription, invoice, widget,
    stripe_event to tarnwright_admin`,
  `grant select (id, email, name, email_verified_at, is_admin, created_at) on app_user to tarnwright_admin`,
  `grant select (account_id, id, kind, mode, name, last4, scopes, origins, cidrs, created_by, created_at, expires_at,
    last_used_at, revoked_at, revoked_by, revoked_reason, successor_id) on api_key to tarnwright_admin`,
  `grant update (revoked_at, revoked_by, revoked_reason) on api_key to tarnwright_admin`,
  `grant update (plan, unit_cap, status, status_reason) on account to tarnwright_admin`,
]

/** What the one role that crosses tenants on behalf of the API may do: look up a key, commit usage. */
const meter = [
  `grant select on account to tarnwright_meter`,
  `create policy meter on account for select to tarnwright_meter using (true)`,
  `grant select on api_key to tarnwright_meter`,
  `grant update (last_used_at) on api_key to tarnwright_meter`,
  `create policy meter on api_key to tarnwright_meter using (true) with check (true)`,
  `grant select on widget to tarnwright_meter`,
  `create policy meter on widget for select to tarnwright_meter using (true)`,
  `grant insert on usage_event to tarnwright_meter`,
  `create policy meter on usage_event for insert to tarnwright_meter with check (true)`,
  `grant select, insert, update (units) on usage_counter to tarnwright_meter`,
  `create policy meter on usage_counter to tarnwright_meter using (true) with check (true)`,
  `create type access_row as (
    key_id text, account_id text, kind text, mode text, scopes text[], origins text[], cidrs text[],
    expires_at timestamptz, revoked_at timestamptz, account_status text, plan text, unit_cap bigint)`,
  `create function key_by_digest(p_digests bytea[]) returns setof access_row
    language sql stable security definer set search_path = public, pg_temp as $$
    select k.id, k.account_id, k.kind, k.mode, k.scopes, k.origins, k.cidrs, k.expires_at, k.revoked_at,
           a.status, a.plan, a.unit_cap
      from api_key k join account a on a.id = k.account_id
     where k.digest = any (p_digests)
  $$`,
  `create function widget_access(p_widget_id text) returns setof access_row
    language sql stable security definer set search_path = public, pg_temp as $$
    select w.id, w.account_id, 'widget', 'live', array['widgets'], w.origins, '{}'::text[], null::timestamptz,
           w.disabled_at, a.status, a.plan, a.unit_cap
      from widget w join account a on a.id = w.account_id
     where w.id = p_widget_id
  $$`,
  // The group commit. Calls are admitted in the order they came, as long as the account's cap holds them all;
  // counters are locked in one order, so that two flushes wait for each other instead of dead-locking.
  `create function meter_commit(
      p_id text[], p_account_id text[], p_key_id text[], p_mode text[], p_operation text[], p_units integer[],
      p_request_id text[], p_engine_version text, p_sandbox_cap bigint)
    returns table (call_id text, admitted boolean, cap bigint, used bigint, resets_at timestamptz)
    language plpgsql security definer set search_path = public, pg_temp as $$
  #variable_conflict use_column
  begin
    insert into usage_counter (account_id, mode, period_start, period_end)
      select distinct a.id, c.mode, p.period_start, p.period_end
        from unnest(p_account_id, p_mode) as c (account_id, mode)
        join account a on a.id = c.account_id
        cross join lateral metering_period(c.mode, a.period_anchor, now()) p
       where not exists (select from usage_counter u
              where u.account_id = a.id and u.mode = c.mode and u.period_start = p.period_start)
       order by a.id, c.mode
      on conflict do nothing;

    return query
    with call as materialized (
      select * from unnest(p_id, p_account_id, p_key_id, p_mode, p_operation, p_units, p_request_id)
        with ordinality as c (id, account_id, key_id, mode, operation, units, request_id, position)
    ), tenant as (
      select t.account_id, t.mode, p.period_start,
             case t.mode when 'sandbox' then p_sandbox_cap else a.unit_cap end as cap
        from (select distinct account_id, mode from call) t
        join account a on a.id = t.account_id
        cross join lateral metering_period(t.mode, a.period_anchor, now()) p
    ), counter as materialized (
      select u.account_id, u.mode, u.period_start, u.period_end, u.units, t.cap
        from usage_counter u
        join tenant t on t.account_id = u.account_id and t.mode = u.mode and t.period_start = u.period_start
       order by u.account_id, u.mode
         for update of u
    ), judged as materialized (
      select c.*, n.cap, n.period_start, n.period_end,
             n.units + sum(c.units) over (partition by c.account_id, c.mode order by c.position) as after
        from call c join counter n on n.account_id = c.account_id and n.mode = c.mode
    ), ledger as (
      insert into usage_event (account_id, id, key_id, mode, operation, units, engine_version, request_id)
        select account_id, id, key_id, mode, operation, units, p_engine_version, request_id
          from judged where after <= cap
    ), spent as (
      update usage_counter u set units = u.units + s.units
        from (select account_id, mode, period_start, sum(units) as units
                from judged where after <= cap group by 1, 2, 3) s
       where u.account_id = s.account_id and u.mode = s.mode and u.period_start = s.period_start
    )
    select j.id, j.after <= j.cap, j.cap, least(j.after, j.cap), j.period_end from judged j;

    update api_key k set last_used_at = now()
     where k.id = any (p_key_id) and (k.last_used_at is null or k.last_used_at < now() - interval '1 minute');
  end $$`,
  `alter function key_by_digest(bytea[]) owner to tarnwright_meter`,
  `alter function widget_access(text) owner to tarnwright_meter`,
  `alter function meter_commit(text[], text[], text[], text[], text[], integer[], text[], text, bigint)
    owner to tarnwright_meter`,
  `revoke create on schema public from tarnwright_meter`,
  `revoke execute on all functions in schema public from public`,
  `grant execute on function metering_period(text, timestamptz, timestamptz)
    to tarnwright_app, tarnwright_worker, tarnwright_admin, tarnwright_meter`,
  `grant execute on function make_usage_partitions(date, date) to tarnwright_worker`,
  `grant execute on function key_by_digest(bytea[]), widget_access(text),
    meter_commit(text[], text[], text[], text[], text[], integer[], text[], text, bigint) to tarnwright_app`,
]

const jobs = [
  // The queue lives in a schema of its own that only its owner writes; a job is put there in the caller's transaction.
  `create function enqueue_job(p_task text, p_payload json, p_job_key text default null) returns void
    language sql security definer set search_path = public, pg_temp as $$
    select graphile_worker.add_job(p_task, p_payload, job_key => p_job_key)
  $$`,
  `revoke execute on function enqueue_job(text, json, text) from public`,
  `grant execute on function enqueue_job(text, json, text) to tarnwright_app, tarnwright_worker, tarnwright_admin`,
]

const statements = [
  ...identity,
  ...keys,
  ...usage,
  ...billing,
  ...widgets,
  ...audit,
  ...security,
  ...personal,
  ...rights,
  ...meter,
  ...jobs,
]
