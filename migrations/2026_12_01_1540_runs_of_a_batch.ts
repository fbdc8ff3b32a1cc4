import { type Kysely, sql } from "kysely"

/**
 * One ledger row for a run of calls: calculations of one operation that stand in a row in a batch. A batch of a hundred
 * cost the ledger a hundred rows, which was most of what it cost.
 */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const oldSignature = "text[], text[], text[], text[], text[], integer[], text[], text, bigint"
const signature = "text[], text[], text[], text[], text[], integer[], integer[], text[], text, bigint"

/**
 * The group commit as it was, where each item is a run: `p_calls` calls of `p_units` units each, of which as many are
 * admitted as still fit the cap. What was asked for before in this flush counts, admitted or not, so that the rest of a
 * batch is refused once one call of it did not fit.
 */
const groupCommit = `create function meter_commit(
      p_id text[], p_account_id text[], p_key_id text[], p_mode text[], p_operation text[], p_calls integer[],
      p_units integer[], p_request_id text[], p_engine_version text, p_sandbox_cap bigint)
    returns table (run_id text, admitted integer, cap bigint, used bigint, resets_at timestamptz)
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
    with run as materialized (
      select * from unnest(p_id, p_account_id, p_key_id, p_mode, p_operation, p_calls, p_units, p_request_id)
        with ordinality as c (id, account_id, key_id, mode, operation, calls, units, request_id, position)
    ), tenant as (
      select t.account_id, t.mode, p.period_start,
             case t.mode when 'sandbox' then p_sandbox_cap else a.unit_cap end as cap
        from (select distinct account_id, mode from run) t
        join account a on a.id = t.account_id
        cross join lateral metering_period(t.mode, a.period_anchor, now()) p
    ), counter as materialized (
      select u.account_id, u.mode, u.period_start, u.period_end, u.units, t.cap
        from usage_counter u
        join tenant t on t.account_id = u.account_id and t.mode = u.mode and t.period_start = u.period_start
       order by u.account_id, u.mode
         for update of u
    ), asked as (
      select r.*, n.cap, n.period_start, n.period_end, n.units as counted,
             n.units + sum(r.calls * r.units) over (partition by r.account_id, r.mode order by r.position) as after
        from run r join counter n on n.account_id = r.account_id and n.mode = r.mode
    ), judged as materialized (
      select a.*, greatest(0, least(a.calls, (a.cap - (a.after - a.calls * a.units)) / a.units))::integer as admitted
        from asked a
    ), ledger as (
      insert into usage_event
          (account_id, id, key_id, mode, operation, calls, units, engine_version, request_id)
        select account_id, id, key_id, mode, operation, admitted, admitted * units, p_engine_version, request_id
          from judged where admitted > 0
    ), spent as (
      update usage_counter u set units = u.units + s.units
        from (select account_id, mode, period_start, sum(admitted * units) as units
                from judged where admitted > 0 group by 1, 2, 3) s
       where u.account_id = s.account_id and u.mode = s.mode and u.period_start = s.period_start
    ), reached as (
      insert into usage_threshold (account_id, period_start, percent, period_end, units, unit_cap)
        select j.account_id, j.period_start, mark.percent, j.period_end, j.spent, j.cap
          from (select account_id, period_start, period_end, cap, max(after) as asked,
                       coalesce(max(after - (calls - admitted) * units) filter (where admitted > 0),
                         min(counted)) as spent
                  from judged where mode = 'live' and cap > 0 group by 1, 2, 3, 4) j
          cross join (values (80), (100)) as mark (percent)
         where j.asked * 100 >= j.cap * mark.percent
         order by 1, 3
      on conflict do nothing
    )
    select j.id, j.admitted, j.cap, least(j.after - (j.calls - greatest(j.admitted, 1)) * j.units, j.cap)::bigint,
           j.period_end
      from judged j;

    update api_key k set last_used_at = now()
     where k.id = any (p_key_id) and (k.last_used_at is null or k.last_used_at < now() - interval '1 minute');
  end $$`

const statements = [
  `alter table usage_event add column calls integer not null default 1 check (calls > 0)`,
  `drop function meter_commit(${oldSignature})`,
  `grant create on schema public to tarnwright_meter`,
  groupCommit,
  `alter function meter_commit(${signature}) owner to tarnwright_meter`,
  `revoke create on schema public from tarnwright_meter`,
  `revoke execute on function meter_commit(${signature}) from public`,
  `grant execute on function meter_commit(${signature}) to tarnwright_app`,
]
