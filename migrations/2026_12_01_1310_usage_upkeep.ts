import { type Kysely, sql } from "kysely"

/** Thresholds that the group commit notes, the state of the hourly sums, and the life of ledger partitions. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const thresholds = [
  `create table usage_threshold (
    account_id text not null references account on delete cascade,
    period_start timestamptz not null,
    percent integer not null check (percent in (80, 100)),
    period_end timestamptz not null,
    units bigint not null,
    unit_cap bigint not null,
    reached_at timestamptz not null default now(),
    notified_at timestamptz,
    primary key (account_id, period_start, percent)
  )`,
  `alter table usage_threshold enable row level security`,
  `alter table usage_threshold force row level security`,
  `create policy tenant on usage_threshold for select to tarnwright_app
    using (account_id = current_setting('app.account', true))`,
  `create policy worker on usage_threshold to tarnwright_worker using (true) with check (true)`,
  `create policy admin_reads on usage_threshold for select to tarnwright_admin using (true)`,
  `create policy meter on usage_threshold to tarnwright_meter using (true) with check (true)`,
  `grant select on usage_threshold to tarnwright_app, tarnwright_admin`,
  `grant select, update (notified_at), delete on usage_threshold to tarnwright_worker`,
  `grant select, insert on usage_threshold to tarnwright_meter`,
  // The row and the job that tells of it commit with the call that reached the threshold.
  `create function announce_threshold() returns trigger language plpgsql as $$
  begin
    perform enqueue_job('announce_threshold', json_build_object('account_id', new.account_id,
      'period_start', to_char(new.period_start at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"'),
      'percent', new.percent));
    return null;
  end $$`,
  `create trigger threshold_reached after insert on usage_threshold
    for each row execute function announce_threshold()`,
  `grant execute on function enqueue_job(text, json, text, timestamptz, text) to tarnwright_meter`,
]

/**
 * The group commit as it was, and one step more: a live period that stands at 80 or 100 percent after this flush, or
 * that had no room for a call of it, gets a row for each mark, once. An account below them costs no look-up.
 */
const groupCommit = `create or replace function meter_commit(
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
      select c.*, n.cap, n.period_start, n.period_end, n.units as before,
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
    ), reached as (
      insert into usage_threshold (account_id, period_start, percent, period_end, units, unit_cap)
        select j.account_id, j.period_start, mark.percent, j.period_end, j.spent, j.cap
          from (select account_id, period_start, period_end, cap, max(after) as asked,
                       coalesce(max(after) filter (where after <= cap), min(before)) as spent
                  from judged where mode = 'live' and cap > 0 group by 1, 2, 3, 4) j
          cross join (values (80), (100)) as mark (percent)
         where j.asked * 100 >= j.cap * mark.percent
         order by 1, 3
      on conflict do nothing
    )
    select j.id, j.after <= j.cap, j.cap, least(j.after, j.cap), j.period_end from judged j;

    update api_key k set last_used_at = now()
     where k.id = any (p_key_id) and (k.last_used_at is null or k.last_used_at < now() - interval '1 minute');
  end $$`

const rollups = [
  // One row: the hours before it are summed.
  `create table usage_rollup (
    singleton boolean primary key default true check (singleton),
    rolled_until timestamptz
  )`,
  `insert into usage_rollup default values`,
  `grant select, update on usage_rollup to tarnwright_worker`,
  // The ledger is read by time across accounts here alone; a block range index costs the writer next to nothing.
  `create index usage_event_by_time on usage_event using brin (at) with (autosummarize = on)`,
]

const partitions = [
  // Attaching, unlike PARTITION OF, lets the ledger be written meanwhile. Rows that came before their partition was
  // made lie in the default one and move along. @source PostgreSQL manual, ALTER TABLE … ATTACH PARTITION
  `create or replace function make_usage_partitions(p_from date, p_to date) returns void
    language plpgsql security definer set search_path = public, pg_temp set lock_timeout = '2s' as $$
  declare
    first_day date;
    name text;
    day_start timestamptz;
    day_end timestamptz;
  begin
    perform pg_advisory_xact_lock(hashtext('make_usage_partitions'));
    for first_day in select generate_series(p_from, p_to, interval '1 day')::date loop
      name := 'usage_event_' || to_char(first_day, 'YYYYMMDD');
      continue when to_regclass(name) is not null;
      day_start := first_day::timestamp at time zone 'UTC';
      day_end := (first_day + 1)::timestamp at time zone 'UTC';
      execute format('create table %I (like usage_event including defaults including constraints)', name);
      lock table usage_event_default in access exclusive mode;
      execute format('with moved as (delete from usage_event_default where at >= %L and at < %L returning *)
        insert into %I select * from moved', day_start, day_end, name);
      execute format('alter table usage_event attach partition %I for values from (%L) to (%L)',
        name, day_start, day_end);
    end loop;
  end $$`,
  // DETACH CONCURRENTLY is not allowed beside a default partition, so the drop waits for its lock, but not for long.
  `create function drop_usage_partitions(p_before date) returns integer
    language plpgsql security definer set search_path = public, pg_temp set lock_timeout = '2s' as $$
  declare
    name text;
    dropped integer := 0;
  begin
    for name in
      select c.relname from pg_inherits i join pg_class c on c.oid = i.inhrelid
       where i.inhparent = 'usage_event'::regclass and c.relname ~ '^usage_event_[0-9]{8}$'
         and to_date(right(c.relname, 8), 'YYYYMMDD') < p_before
       order by 1
    loop
      execute format('drop table %I', name);
      dropped := dropped + 1;
    end loop;
    delete from usage_event_default where at < p_before::timestamp at time zone 'UTC';
    return dropped;
  end $$`,
  `revoke execute on function drop_usage_partitions(date) from public`,
  `grant execute on function drop_usage_partitions(date) to tarnwright_worker`,
]

const statements = [...thresholds, groupCommit, ...rollups, ...partitions]
