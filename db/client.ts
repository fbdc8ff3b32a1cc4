import { Kysely, PostgresDialect, sql, type Transaction } from "kysely"
import pg from "pg"
import { env } from "@/lib/env"
import type { Schema } from "./schema"
import { orUnavailable } from "./unavailable"

export type Trx = Transaction<Schema>

/** Roles of the database that a process of ours signs in as; see db/roles.sql. */
type DatabaseRole = "app" | "worker" | "admin"

// Counters, sums and money stay below 2^53 (PLATFORM 3.8 and 1.21), so a bigint may be read as a number.
pg.types.setTypeParser(pg.types.builtins.INT8, Number)
pg.types.setTypeParser(pg.types.builtins.NUMERIC, Number)

// Next bundles its routes apart from the custom server; both must share one pool a role.
const shared = globalThis as typeof globalThis & { tarnwrightPools?: Map<DatabaseRole, pg.Pool> }

/** The connection pool of a role, opened on first use. A connection must be had within 2 s or the call fails. */
export function pool(role: DatabaseRole): pg.Pool {
  shared.tarnwrightPools ??= new Map()
  let found = shared.tarnwrightPools.get(role)
  if (!found) {
    found = new pg.Pool({
      connectionString: connectionString(role),
      max: 10,
      connectionTimeoutMillis: 2_000,
      idleTimeoutMillis: 30_000,
    })
    // An idle connection that the database ends is replaced on the next use; without a listener it ends the process.
    found.on("error", () => {})
    shared.tarnwrightPools.set(role, found)
  }
  return found
}

/** Closes every pool; for scripts and tests that have to end. */
export async function closePools(): Promise<void> {
  const open = [...(shared.tarnwrightPools?.values() ?? [])]
  shared.tarnwrightPools = undefined
  await Promise.all(open.map((each) => each.end()))
}

/** One statement outside any transaction, prepared once a connection under `name`: for the paths of every call. */
export async function statement<Row extends pg.QueryResultRow>(
  role: DatabaseRole,
  query: { name: string; text: string; values: unknown[] },
): Promise<Row[]> {
  const { rows } = await orUnavailable(() => pool(role).query<Row>(query))
  return rows
}

/** Runs `work` in one transaction that sees the rows of one account, and no other's. */
export function withTenant<T>(account_id: string, work: (trx: Trx) => Promise<T>): Promise<T> {
  return inTransaction("app", { "app.account": account_id }, work)
}

/** Runs `work` in one transaction that sees a person's own memberships and the accounts they belong to. */
export function withUser<T>(user_id: string, work: (trx: Trx) => Promise<T>): Promise<T> {
  return inTransaction("app", { "app.user": user_id }, work)
}

/** Runs `work` in one transaction on tables that belong to no tenant: people, sessions, one-time tokens. */
export function withoutTenant<T>(work: (trx: Trx) => Promise<T>): Promise<T> {
  return inTransaction("app", {}, work)
}

/** Runs `work` in one transaction of the worker, whose jobs cross tenants by nature. */
export function asWorker<T>(work: (trx: Trx) => Promise<T>): Promise<T> {
  return inTransaction("worker", {}, work)
}

/** Runs `work` in one transaction of the platform's admin, who reads accounts but no shopper's personal data. */
export function asAdmin<T>(work: (trx: Trx) => Promise<T>): Promise<T> {
  return inTransaction("admin", {}, work)
}

function inTransaction<T>(
  role: DatabaseRole,
  settings: Record<string, string>,
  work: (trx: Trx) => Promise<T>,
): Promise<T> {
  return orUnavailable(() =>
    database(role)
      .transaction()
      .execute(async (trx) => {
        for (const [name, value] of Object.entries(settings)) {
          await sql`select set_config(${name}, ${value}, true)`.execute(trx)
        }
        return work(trx)
      }),
  )
}

const databases = new WeakMap<pg.Pool, Kysely<Schema>>()

function database(role: DatabaseRole): Kysely<Schema> {
  const connections = pool(role)
  let found = databases.get(connections)
  if (!found) {
    found = new Kysely<Schema>({ dialect: new PostgresDialect({ pool: connections }) })
    databases.set(connections, found)
  }
  return found
}

function connectionString(role: DatabaseRole): string {
  switch (role) {
    case "app":
      return env().DATABASE_URL
    case "worker":
      return env().DATABASE_WORKER_URL
    case "admin":
      return env().DATABASE_ADMIN_URL
  }
}
