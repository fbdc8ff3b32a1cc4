import { type Kysely, sql } from "kysely"

/** What was told to Stripe of the units beyond the plan, an hour each. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  `create table overage_report (
    account_id text not null references account on delete cascade,
    hour timestamptz not null,
    units bigint not null check (units >= 0),
    -- What the plan included when the hour was first reported: a later change of plan does not reach back.
    included_units bigint not null,
    -- Grows when the total changes; part of what makes a message of it unique.
    revision integer not null default 1,
    delivered_at timestamptz,
    primary key (account_id, hour)
  )`,
  `create index overage_report_waiting on overage_report (account_id) where delivered_at is null`,
  `alter table overage_report enable row level security`,
  `alter table overage_report force row level security`,
  `create policy tenant on overage_report for select to tarnwright_app
    using (account_id = current_setting('app.account', true))`,
  `create policy worker on overage_report to tarnwright_worker using (true) with check (true)`,
  `create policy admin_reads on overage_report for select to tarnwright_admin using (true)`,
  `grant select on overage_report to tarnwright_app, tarnwright_admin`,
  `grant select, insert, update, delete on overage_report to tarnwright_worker`,
]
