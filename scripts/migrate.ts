/**
 * Brings a database to the newest migration, as the role that owns the schema: `DATABASE_OWNER_URL`, or the database
 * of the local run. Safe to repeat and safe to run twice at once (both migrators take a lock).
 */
import { readdir } from "node:fs/promises"
import path from "node:path"
import { pathToFileURL } from "node:url"
import { runMigrations } from "graphile-worker"
import { Kysely, type Migration, type MigrationProvider, Migrator, PostgresDialect } from "kysely"
import pg from "pg"
import { loadLocalEnv } from "./stack/local-env"

const folder = path.join(import.meta.dirname, "../migrations")

/** Applies what is missing and returns the names of the migrations that were applied. */
export async function migrate(ownerUrl: string): Promise<string[]> {
  // The job queue comes first: our own migrations call it.
  await runMigrations({ connectionString: ownerUrl })
  const pool = new pg.Pool({ connectionString: ownerUrl, max: 2 })
  try {
    await pool.query(queueRights)
    return await applyMigrations(pool)
  } finally {
    await pool.end()
  }
}

// The queue's tables come with row-level security and without a policy, so that only their owner sees a row.
const queueRights = `
  grant usage on schema graphile_worker to tarnwright_worker;
  grant select, insert, update, delete on all tables in schema graphile_worker to tarnwright_worker;
  grant usage on all sequences in schema graphile_worker to tarnwright_worker;
  do $$
  declare
    queue_table text;
  begin
    for queue_table in
      select c.relname from pg_class c
       where c.relnamespace = 'graphile_worker'::regnamespace and c.relrowsecurity
         and not exists (select from pg_policy p where p.polrelid = c.oid and p.polname = 'worker')
    loop
      execute format('create policy worker on graphile_worker.%I to tarnwright_worker using (true) with check (true)',
        queue_table);
    end loop;
  end $$`

async function applyMigrations(pool: pg.Pool): Promise<string[]> {
  const db = new Kysely<unknown>({ dialect: new PostgresDialect({ pool }) })
  // Two branches may each bring a migration, and the one merged last the older name.
  const migrator = new Migrator({ db, provider, allowUnorderedMigrations: true })
  const { error, results = [] } = await migrator.migrateToLatest()
  const failed = results.find((result) => result.status === "Error")
  if (failed) throw new Error(`Migration ${failed.migrationName} failed.`, { cause: error })
  if (error) throw error
  return results.map((result) => result.migrationName)
}

const provider: MigrationProvider = {
  async getMigrations() {
    const files = (await readdir(folder)).filter((file) => file.endsWith(".ts")).sort()
    const migrations: Record<string, Migration> = {}
    for (const file of files) {
      migrations[path.basename(file, ".ts")] = await import(pathToFileURL(path.join(folder, file)).href)
    }
    return migrations
  },
}

if (process.argv[1] === import.meta.filename) {
  loadLocalEnv()
  const ownerUrl = process.env.DATABASE_OWNER_URL
  if (!ownerUrl) throw new Error("Set DATABASE_OWNER_URL, or run npm start once in this folder.")
  const applied = await migrate(ownerUrl)
  console.log(applied.length > 0 ? `applied ${applied.join(", ")}` : "nothing to apply")
}
