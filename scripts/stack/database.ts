/** Makes the roles, the database and the rights to connect, once a cluster; everything below is a migration's. */
import { readFileSync } from "node:fs"
import path from "node:path"
import pg from "pg"
import { DATABASE, databaseUrls, loginRoles, type Secrets } from "./settings"

/** Brings a cluster that accepts connections to where the migrations can begin. Safe to repeat. */
export async function ensureDatabase(root: string, secrets: Secrets, port: number): Promise<void> {
  const urls = databaseUrls(secrets, port)
  const server = new URL(urls.superuser)
  server.pathname = "/postgres"
  await withClient(server.href, async (client) => {
    if (!(await exists(client, "select from pg_roles where rolname = 'tarnwright_owner'"))) {
      await makeRoles(client, readFileSync(path.join(root, "db/roles.sql"), "utf8"), secrets)
    }
    if (await exists(client, `select from pg_database where datname = '${DATABASE}'`)) return
    await client.query(`create database ${DATABASE} owner tarnwright_owner`)
  })
  await withClient(urls.superuser, async (client) => {
    await client.query(`revoke all on database ${DATABASE} from public`)
    await client.query(
      `grant connect on database ${DATABASE} to tarnwright_app, tarnwright_worker, tarnwright_admin`,
    )
    await client.query("alter schema public owner to tarnwright_owner")
  })
}

async function makeRoles(client: pg.Client, roles: string, secrets: Secrets): Promise<void> {
  await client.query("begin")
  await client.query(roles)
  for (const role of loginRoles) {
    const password = pg.escapeLiteral(secrets.rolePasswords[role])
    await client.query(`alter role tarnwright_${role} password ${password}`)
  }
  await client.query("commit")
}

async function exists(client: pg.Client, query: string): Promise<boolean> {
  return (await client.query(query)).rowCount !== 0
}

async function withClient(url: string, work: (client: pg.Client) => Promise<void>): Promise<void> {
  const client = new pg.Client({ connectionString: url })
  await client.connect()
  try {
    await work(client)
  } finally {
    await client.end()
  }
}
