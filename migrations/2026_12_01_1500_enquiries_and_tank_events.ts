import { type Kysely, sql } from "kysely"

/** What shoppers ask a shop, with their consent; and what tanks its widgets were asked about, with no person in it. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  // Whoever erases an enquiry leaves the row, the widget and the consent record, and nothing that a person wrote.
  `create table enquiry (
    account_id text not null references account on delete cascade,
    id text not null,
    widget_id text not null,
    page_origin text not null,
    language text not null,
    name text,
    email text,
    message text,
    tank jsonb,
    consent_version text not null,
    consent_wording text not null,
    consented_at timestamptz not null,
    created_at timestamptz not null default now(),
    erased_at timestamptz,
    erased_by text,
    primary key (account_id, id),
    check ((erased_at is null) = (email is not null and message is not null)),
    check (erased_at is null or (name is null and tank is null))
  )`,
  `create index enquiry_by_time on enquiry (created_at)`,
  // One row a session; the day and not the minute, no address and nothing of the browser.
  `create table tank_event (
    account_id text not null references account on delete cascade,
    session_id text not null,
    widget_id text not null,
    day date not null,
    volume_l double precision,
    ph double precision,
    kh_dkh double precision,
    temperature_c double precision,
    method text,
    level text,
    verdict text,
    primary key (account_id, session_id)
  )`,
  `create index tank_event_by_day on tank_event (account_id, day)`,
  `create index tank_event_by_age on tank_event (day)`,
  // No grant and no policy for the admin role: shoppers' words are none of the platform's business.
  ...["enquiry", "tank_event"].flatMap((table) => [
    `alter table ${table} enable row level security`,
    `alter table ${table} force row level security`,
    `create policy tenant on ${table} to tarnwright_app
      using (account_id = current_setting('app.account', true))
      with check (account_id = current_setting('app.account', true))`,
    `create policy worker on ${table} to tarnwright_worker using (true) with check (true)`,
    `grant select, insert, update on ${table} to tarnwright_app`,
    `grant select, insert, update, delete on ${table} to tarnwright_worker`,
  ]),
]
