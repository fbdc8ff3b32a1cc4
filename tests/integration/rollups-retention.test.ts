import { randomBytes, randomUUID } from "node:crypto"
import pg from "pg"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { closePools } from "@/db"
import { newId } from "@/lib/id"
import { commitUsage, deleteExpired, dropOldPartitions, makePartitions } from "@/lib/usage"
import { createTestAccount } from "../support/account"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber } from "../support/subscriber"

let superuser: pg.Client

beforeAll(async () => {
  takeSettings()
  superuser = new pg.Client({ connectionString: stack().databaseUrls.superuser })
  await superuser.connect()
})

afterAll(async () => {
  await superuser.end()
  await closePools()
})

const query = async (text: string, values: unknown[] = []) => (await superuser.query(text, values)).rows

/** Partition of the ledger for the UTC day so many days from now. */
async function partitionName(days: number): Promise<string> {
  const [row] = await query(
    `select 'usage_event_' || to_char((now() at time zone 'UTC')::date + $1::integer, 'YYYYMMDD') as name`,
    [days],
  )
  return row.name
}

async function exists(table: string): Promise<boolean> {
  return (await query("select to_regclass($1) is not null as there", [table]))[0].there
}

async function writeLedger(account_id: string, days: number): Promise<string> {
  const id = newId("call")
  await query(
    `insert into usage_event (account_id, at, id, key_id, mode, operation, units, engine_version, request_id)
     values ($1, now() + make_interval(days => $2), $3, 'key_a', 'sandbox', 'carbonateCo2', 1, '2026.12.1', 'r')`,
    [account_id, days, id],
  )
  return id
}

const placeOf = async (id: string) =>
  (await query("select tableoid::regclass::text as place from usage_event where id = $1", [id])).map(
    ({ place }) => place,
  )

describe("the partitions of the ledger", () => {
  it("are made 14 days ahead by the worker that starts, so that no call lies in the default one", async () => {
    for (const days of [0, 1, 7, 14])
      expect(await exists(await partitionName(days)), `day ${days}`).toBe(true)
    const { ctx } = await createTestAccount()
    const request_id = newId("request")
    const call = { account_id: ctx.account_id, key_id: "k", mode: "live", operation: "carbonateCo2" } as const
    await commitUsage({ ...call, calls: 1, units: 1, request_id })
    const [row] = await query(
      "select tableoid::regclass::text as place from usage_event where request_id = $1",
      [request_id],
    )
    expect(row.place).toBe(await partitionName(0))
  })

  it("take along what came before they were made", async () => {
    const { ctx } = await createTestAccount()
    const id = await writeLedger(ctx.account_id, 40)
    expect(await placeOf(id)).toEqual(["usage_event_default"])
    await query(
      `select make_usage_partitions((now() at time zone 'UTC')::date + 40, (now() at time zone 'UTC')::date + 40)`,
    )
    expect(await placeOf(id)).toEqual([await partitionName(40)])
  })

  it("may be made twice at once", async () => {
    await query(`drop table ${await partitionName(14)}`)
    await Promise.all([makePartitions(), makePartitions(), makePartitions()])
    expect(await exists(await partitionName(14))).toBe(true)
  })

  it("are dropped after 400 days, with what lies in the default one, and no earlier", async () => {
    const { ctx } = await createTestAccount()
    for (const days of [-402, -400]) {
      await query(
        `select make_usage_partitions((now() at time zone 'UTC')::date + $1::integer,
           (now() at time zone 'UTC')::date + $1::integer)`,
        [days],
      )
    }
    const [old, kept, stray] = [
      await writeLedger(ctx.account_id, -402),
      await writeLedger(ctx.account_id, -400),
      await writeLedger(ctx.account_id, -500),
    ]
    expect(await dropOldPartitions()).toBe(1)
    expect(await exists(await partitionName(-402))).toBe(false)
    expect(await placeOf(old)).toEqual([])
    expect(await placeOf(stray)).toEqual([])
    expect(await placeOf(kept)).toEqual([await partitionName(-400)])
    await query(`drop table ${await partitionName(-400)}`)
  })
})

describe("what is past its time", () => {
  it("is deleted from each table, and nothing of what is not", async () => {
    const { ctx, email } = await createSubscriber()
    const { account_id } = ctx
    const { rows } = await superuser.query("select id from app_user where email = $1", [email])
    const user_id = rows[0].id
    await query(
      `insert into webhook_endpoint (account_id, id, url, events, secret) values ($1, $1, 'u', '{}', '')`,
      [account_id],
    )
    await query(
      `insert into api_key (account_id, id, kind, mode, name, digest, pepper_version, last4, scopes)
       values ($1, $1, 'server', 'live', 'n', $2, 1, 'abcd', '{}')`,
      [account_id, randomBytes(32)],
    )
    const mark = randomUUID()
    // A row a table, made to be a day older, and a day younger, than what is kept.
    const tables: Record<string, { days: number; insert: string; count: string; values: unknown[] }> = {
      refused_call: {
        days: 30,
        insert: `(account_id, id, at, key_id, mode, method, path, status, code, detail)
          values ($2, gen_random_uuid()::text, now() - $1::interval, 'k', 'live', 'GET', '/', 404, 'c', 'd')`,
        count: "account_id = $1",
        values: [account_id],
      },
      idempotency: {
        days: 1,
        insert: `(account_id, mode, key, fingerprint, claimed_at)
          values ($2, 'live', gen_random_uuid()::text, '', now() - $1::interval)`,
        count: "account_id = $1",
        values: [account_id],
      },
      webhook_delivery: {
        days: 30,
        insert: `(account_id, id, endpoint_id, event_id, type, payload, created_at)
          values ($2, gen_random_uuid()::text, $2, 'e', 't', '{}', now() - $1::interval)`,
        count: "account_id = $1",
        values: [account_id],
      },
      session: {
        days: 0,
        insert: `(token_digest, id, user_id, expires_at)
          values (sha256(gen_random_uuid()::text::bytea), gen_random_uuid()::text, $2, now() - $1::interval)`,
        count: "user_id = $1",
        values: [user_id],
      },
      one_time_token: {
        days: 7,
        insert: `(digest, purpose, email, expires_at)
          values (sha256(gen_random_uuid()::text::bytea), 'sign_in', $2, now() - $1::interval)`,
        count: "email = $1",
        values: [mark],
      },
      sign_in_failure: {
        days: 30,
        insert: "(email, at) values ($2, now() - $1::interval)",
        count: "email = $1",
        values: [mark],
      },
      stripe_event: {
        days: 90,
        insert: `(id, type, payload, processed_at)
          values (gen_random_uuid()::text, $2, '{}', now() - $1::interval)`,
        count: "type = $1",
        values: [mark],
      },
      usage_counter: {
        days: 35,
        insert: `(account_id, mode, period_start, period_end)
          values ($2, 'sandbox', now() - $1::interval - interval '1 day', now() - $1::interval)`,
        count: "account_id = $1",
        values: [account_id],
      },
      usage_threshold: {
        days: 400,
        insert: `(account_id, period_start, percent, period_end, units, unit_cap, notified_at)
          values ($2, now() - $1::interval - interval '1 day', 80, now() - $1::interval, 8, 10, now())`,
        count: "account_id = $1",
        values: [account_id],
      },
      account_export: {
        days: 0,
        insert: `(account_id, id, requested_by, expires_at)
          values ($2, gen_random_uuid()::text, 'u', now() - $1::interval)`,
        count: "account_id = $1",
        values: [account_id],
      },
      invitation: {
        days: 30,
        insert: `(account_id, id, email, role, token_digest, invited_by, expires_at)
          values ($2, gen_random_uuid()::text, gen_random_uuid()::text, 'viewer',
            sha256(gen_random_uuid()::text::bytea), 'u', now() - $1::interval)`,
        count: "account_id = $1",
        values: [account_id],
      },
      enquiry: {
        days: 180,
        insert: `(account_id, id, widget_id, page_origin, language, email, message, consent_version, consent_wording,
            consented_at, created_at)
          values ($2, gen_random_uuid()::text, 'w', 'o', 'en', 'e', 'm', 'v', 'w', now(), now() - $1::interval)`,
        count: "account_id = $1",
        values: [account_id],
      },
      tank_event: {
        days: 400,
        // Kept by whole days.
        insert: `(account_id, session_id, widget_id, day)
          values ($2, gen_random_uuid()::text, 'w',
            current_date - case when $1::interval > interval '400 days' then 401 else 400 end)`,
        count: "account_id = $1",
        values: [account_id],
      },
      key_reminder: {
        days: 30,
        insert: `(account_id, key_id, expires_at, days_before) values ($2, $2, now() - $1::interval, 1)`,
        count: "account_id = $1",
        values: [account_id],
      },
    }
    for (const [table, { days, insert, values }] of Object.entries(tables)) {
      // The shortest is kept for a day, so an hour on either side is near enough for all.
      for (const hours of [days * 24 + 1, days * 24 - 1]) {
        await query(`insert into ${table} ${insert}`, [`${hours} hours`, ...values])
      }
    }
    const deleted = await deleteExpired()
    expect(Object.keys(deleted).sort()).toEqual(Object.keys(tables).sort())
    for (const [table, { count, values }] of Object.entries(tables)) {
      expect(await query(`select from ${table} where ${count}`, values), table).toHaveLength(1)
    }
    const unprocessed = await query(
      `insert into stripe_event (id, type, payload, received_at)
       values (gen_random_uuid()::text, $1, '{}', now() - interval '200 days') returning id`,
      [mark],
    )
    await deleteExpired()
    expect(await query("select from stripe_event where id = $1", [unprocessed[0].id])).toHaveLength(1)
    await query("delete from stripe_event where type = $1", [mark])
  })
})
