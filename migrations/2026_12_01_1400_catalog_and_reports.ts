import { type Kysely, sql } from "kysely"

/** The parts that a shop sells, and results that it keeps and shares. */
export async function up(db: Kysely<never>): Promise<void> {
  for (const statement of statements) await sql.raw(statement).execute(db)
}

const statements = [
  `create table catalog_item (
    account_id text not null references account on delete cascade,
    id text not null,
    kind text not null,
    name text not null,
    sku text,
    url text,
    price_minor integer check (price_minor >= 0),
    currency text,
    attributes jsonb not null default '{}',
    created_at timestamptz not null default now(),
    updated_at timestamptz not null default now(),
    primary key (account_id, id),
    unique (account_id, sku),
    check ((price_minor is null) = (currency is null))
  )`,
  `create table report (
    account_id text not null references account on delete cascade,
    id text not null,
    kind text not null,
    title text not null,
    shopper text,
    input jsonb not null,
    answer jsonb not null,
    engine_version text not null,
    created_by text not null,
    created_at timestamptz not null default now(),
    share_slug text unique,
    primary key (account_id, id)
  )`,
  ...["catalog_item", "report"].flatMap((table) => [
    `alter table ${table} enable row level security`,
    `alter table ${table} force row level security`,
    `create policy tenant on ${table} to tarnwright_app
      using (account_id = current_setting('app.account', true))
      with check (account_id = current_setting('app.account', true))`,
    `create policy worker on ${table} to tarnwright_worker using (true) with check (true)`,
    `grant select, insert, update, delete on ${table} to tarnwright_app, tarnwright_worker`,
  ]),
  // A shared report is read by whoever has its unguessable slug, before any account is known.
  `grant create on schema public to tarnwright_meter`,
  `grant select on report to tarnwright_meter`,
  `create policy meter on report for select to tarnwright_meter using (share_slug is not null)`,
  `create function shared_report(p_slug text)
    returns table (id text, kind text, title text, input jsonb, answer jsonb, engine_version text,
      created_at timestamptz, account_name text)
    language sql stable security definer set search_path = public, pg_temp as $$
    select r.id, r.kind, r.title, r.input, r.answer, r.engine_version, r.created_at, a.name
      from report r join account a on a.id = r.account_id
     where r.share_slug = p_slug and a.status = 'active'
  $$`,
  `alter function shared_report(text) owner to tarnwright_meter`,
  `revoke create on schema public from tarnwright_meter`,
  `revoke execute on function shared_report(text) from public`,
  `grant execute on function shared_report(text) to tarnwright_app`,
]
