/**
 * Loads the demo world into the database of a local run, once. What is there already stays; what is missing, after
 * a run that stopped half-way, is made. Keys cannot be read back, so they are kept in the file named by `DEMO_FILE`.
 */
import { readFileSync, writeFileSync } from "node:fs"
import { sql } from "kysely"
import { asWorker, closePools, type Role, type Trx } from "@/db"
import { hashPassword } from "@/lib/accounts"
import { planOf } from "@/lib/billing/plans"
import type { Ctx } from "@/lib/context"
import { newId } from "@/lib/id"
import { createKey } from "@/lib/keys"
import { createWidget, listWidgets } from "@/lib/widgets"
import { writeHistory } from "./seed/history"
import { fillShelf } from "./seed/shelf"
import { writeEnquiries, writeTanks } from "./seed/shoppers"
import { accounts, admin } from "./seed/world"
import type { Demo } from "./stack/stack"

const file = setting("DEMO_FILE")
const shopOrigin = new URL(setting("SHOP_URL")).origin
const password = setting("DEMO_PASSWORD")
const superuserUrl = setting("DATABASE_SUPERUSER_URL")

const made = readDemo()
if (made) {
  await moveShop(made)
  console.log("its shop page moved to another port")
} else {
  await load()
  console.log("loaded")
}
await closePools()

async function load(): Promise<void> {
  const now = new Date()
  const owners = await asWorker(makeAccounts)
  const fernhollow: Ctx = { ...owners.get("fernhollow")!, now }
  const quillback: Ctx = { ...owners.get("quillback")!, now }
  const widgetId = await makeWidget(fernhollow)
  await fillShelf(fernhollow)

  const key = { scopes: ["calculate"], mode: "sandbox" } as const
  const sandbox = await createKey({
    ctx: fernhollow,
    input: { ...key, kind: "server", name: "Trying things out" },
  })
  const browser = await createKey({
    ctx: fernhollow,
    input: { ...key, kind: "browser", mode: "live", name: "Product pages", origins: [shopOrigin] },
  })
  const till = await createKey({
    ctx: quillback,
    input: { ...key, kind: "server", mode: "live", name: "Packaging" },
  })
  await writeHistory(
    superuserUrl,
    [
      { account_id: fernhollow.account_id, key_id: browser.key.id, callsPerDay: 240 },
      { account_id: quillback.account_id, key_id: till.key.id, callsPerDay: 12 },
    ],
    now,
  )
  const shop = {
    account_id: fernhollow.account_id,
    name: "Fernhollow Aquatics",
    widget_id: widgetId,
    origin: shopOrigin,
  }
  await asWorker(async (trx) => {
    await writeTanks(trx, shop, now)
    await writeEnquiries(trx, shop, now)
  })
  const demo: Demo = {
    password,
    people: [
      ...accounts.flatMap(({ name, people }) =>
        people.map(({ email, role }) => ({ email, does: `${role} of ${name}` })),
      ),
      { email: admin.email, does: "platform admin, who sets up a second factor first" },
    ],
    sandboxKey: sandbox.secret,
    browserKey: browser.secret,
    widgetId,
    shopOrigin,
  }
  writeFileSync(file, `${JSON.stringify(demo, null, 2)}\n`, { mode: 0o600 })
}

/** The accounts with their people, and for each account the context in which its owner acts. */
async function makeAccounts(trx: Trx): Promise<Map<string, Omit<Ctx, "now">>> {
  const passwordHash = await hashPassword(password)
  await makePerson(trx, admin, passwordHash, true)
  const owners = new Map<string, Omit<Ctx, "now">>()
  for (const { slug, name, plan, people } of accounts) {
    const account_id = await makeAccount(trx, { slug, name, plan })
    for (const person of people) {
      const user_id = await makePerson(trx, person, passwordHash, false)
      await join(trx, { account_id, user_id, role: person.role })
      const owner = { account_id, actor: { kind: "user", id: user_id, role: "owner" } } as const
      if (person.role === "owner") owners.set(slug, owner)
    }
  }
  return owners
}

async function makeAccount(trx: Trx, account: { slug: string; name: string; plan: string }): Promise<string> {
  const unit_cap = planOf(account.plan).included_units
  await trx
    .insertInto("account")
    .values({ id: newId("account"), ...account, unit_cap })
    .onConflict((conflict) => conflict.column("slug").doNothing())
    .execute()
  const { id } = await trx
    .selectFrom("account")
    .select("id")
    .where("slug", "=", account.slug)
    .executeTakeFirstOrThrow()
  return id
}

async function makePerson(
  trx: Trx,
  { email, name }: { email: string; name: string },
  password_hash: string,
  is_admin: boolean,
): Promise<string> {
  await trx
    .insertInto("app_user")
    .values({ id: newId("user"), email, name, password_hash, is_admin, email_verified_at: new Date() })
    .onConflict((conflict) => conflict.column("email").doNothing())
    .execute()
  const { id } = await trx
    .selectFrom("app_user")
    .select("id")
    .where("email", "=", email)
    .executeTakeFirstOrThrow()
  return id
}

async function join(
  trx: Trx,
  membership: { account_id: string; user_id: string; role: Role },
): Promise<void> {
  await trx
    .insertInto("membership")
    .values(membership)
    .onConflict((conflict) => conflict.columns(["account_id", "user_id"]).doNothing())
    .execute()
}

async function makeWidget(ctx: Ctx): Promise<string> {
  const [found] = await listWidgets({ ctx })
  if (found) return found.id
  const input = {
    calculator: "co2-level",
    name: "CO2 level on product pages",
    origins: [shopOrigin],
    settings: { enquiries: { privacy_url: `${shopOrigin}/privacy` } },
  } as const
  return (await createWidget({ ctx, input })).id
}

/** The shop page had to take another port, so the origins that the demo allows move with it. */
async function moveShop(demo: Demo): Promise<void> {
  await asWorker(async (trx) => {
    for (const table of ["api_key", "widget"] as const) {
      await trx
        .updateTable(table)
        .set({ origins: sql<string[]>`array_replace(origins, ${demo.shopOrigin}, ${shopOrigin})` })
        .where(sql<boolean>`${demo.shopOrigin} = any(origins)`)
        .execute()
    }
    await trx
      .updateTable("widget")
      .set({ settings: sql<string>`replace(settings::text, ${demo.shopOrigin}, ${shopOrigin})::jsonb` })
      .where("id", "=", demo.widgetId)
      .execute()
  })
  writeFileSync(file, `${JSON.stringify({ ...demo, shopOrigin }, null, 2)}\n`, { mode: 0o600 })
}

function readDemo(): Demo | undefined {
  try {
    return JSON.parse(readFileSync(file, "utf8"))
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === "ENOENT") return undefined
    throw error
  }
}

function setting(name: string): string {
  const value = process.env[name]
  if (!value) throw new Error(`Set ${name}: the start command does.`)
  return value
}
