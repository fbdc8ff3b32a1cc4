import { strFromU8, unzipSync } from "fflate"
import { sql } from "kysely"
import request from "supertest"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools } from "@/db"
import { startCheckout } from "@/lib/billing"
import { syncAccount } from "@/lib/billing/sync-account"
import { closeAccount, deleteClosedAccounts, readClosing, reopenAccount } from "@/lib/closing"
import { listExports, readExport, requestExport } from "@/lib/exports"
import { createTestAccount } from "../support/account"
import { waitForMail } from "../support/mailbox"
import { createMember } from "../support/people"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber, standInClient, visit } from "../support/subscriber"

beforeAll(takeSettings)
afterAll(closePools)

const name = "A test's account"
const day_ms = 86_400_000

async function owned() {
  const account = await createTestAccount()
  const owner = await createMember(account.ctx.account_id, "owner")
  return { account, account_id: account.ctx.account_id, ...owner }
}

async function statusOfCall(secret: string): Promise<number> {
  const { status } = await request(stack().appUrl)
    .get("/api/v1/account")
    .set("authorization", `Bearer ${secret}`)
  return status
}

describe("an archive of an account's data", () => {
  it("is made by the worker, told of by mail, and fetched by an owner until a week later", async () => {
    const { account, ctx, person, account_id } = await owned()
    const { key, secret } = await account.key({ name: "Till", scopes: ["calculate", "usage"] })
    const { id } = await requestExport({ ctx })
    await expect
      .poll(async () => (await listExports({ ctx }))[0]?.finished_at, { timeout: 15_000 })
      .toBeInstanceOf(Date)
    const letter = await waitForMail(person.email, "is ready")
    expect(letter.text).toContain(`/portal/${account.slug}/settings#export`)

    const { archive } = await readExport({ ctx, input: { export_id: id } })
    const files = unzipSync(new Uint8Array(archive))
    const keys = JSON.parse(strFromU8(files["json/keys.json"]!))
    expect(keys).toMatchObject([{ id: key.id, name: "Till", last4: secret.slice(-4) }])
    expect(JSON.parse(strFromU8(files["json/account.json"]!))).toMatchObject([{ id: account_id }])
    expect(JSON.parse(strFromU8(files["json/team.json"]!))).toMatchObject([{ user_id: person.id }])
    const everything = Object.values(files)
      .map((file) => strFromU8(file))
      .join()
    expect(everything).not.toContain(secret)
    expect(Object.keys(keys[0])).not.toContain("digest")

    const later = { ...ctx, now: new Date(Date.now() + 7 * day_ms + 60_000) }
    await expect(readExport({ ctx: later, input: { export_id: id } })).rejects.toMatchObject({
      code: "not_found",
    })
    const stranger = await owned()
    await expect(readExport({ ctx: stranger.ctx, input: { export_id: id } })).rejects.toMatchObject({
      code: "not_found",
    })
  })

  it("is an owner's alone, five times a day", async () => {
    const { ctx, account_id } = await owned()
    const developer = await createMember(account_id, "developer")
    await expect(requestExport({ ctx: developer.ctx })).rejects.toMatchObject({ code: "forbidden" })
    for (let time = 0; time < 5; time++) await requestExport({ ctx })
    await expect(requestExport({ ctx })).rejects.toMatchObject({ code: "rate_limited" })
  })
})

describe("an account that is closed", () => {
  it("has keys that stop at once and work again when it is taken back", async () => {
    const { account, ctx, person } = await owned()
    const { secret } = await account.key({ scopes: ["usage"] })
    const before = await statusOfCall(secret)
    await closeAccount({ ctx, input: { name } })
    await expect.poll(() => statusOfCall(secret)).toBe(403)
    await waitForMail(person.email, "will be deleted")
    expect(await readClosing({ ctx })).toEqual(ctx.now)
    await expect(closeAccount({ ctx, input: { name } })).rejects.toMatchObject({ code: "conflict" })
    await reopenAccount({ ctx })
    await expect.poll(() => statusOfCall(secret)).toBe(before)
    expect(await readClosing({ ctx })).toBeNull()
    await expect(reopenAccount({ ctx })).rejects.toMatchObject({ code: "conflict" })
  })

  it("is closed by an owner who writes its name, and by nobody else", async () => {
    const { ctx, account_id } = await owned()
    const developer = await createMember(account_id, "developer")
    await expect(closeAccount({ ctx: developer.ctx, input: { name } })).rejects.toMatchObject({
      code: "forbidden",
    })
    await expect(closeAccount({ ctx, input: { name: "Another" } })).rejects.toMatchObject({
      code: "validation_failed",
      errors: [{ pointer: "/name" }],
    })
  })

  it("is deleted with all that is in it after fourteen days, not before, and its people stay", async () => {
    const { account, ctx, account_id, person } = await owned()
    await account.key()
    const bystander = await owned()
    await asWorker((trx) =>
      trx
        .insertInto("usage_hour")
        .values({
          account_id,
          hour: new Date(),
          mode: "live",
          operation: "carbonateCo2",
          key_id: "k",
          calls: 1,
          units: 1,
        })
        .execute(),
    )
    await closeAccount({ ctx, input: { name } })
    const at = (days: number) => new Date(ctx.now.getTime() + days * day_ms)
    expect(await deleteClosedAccounts({ now: at(13.9) })).not.toContain(account_id)
    expect(await deleteClosedAccounts({ now: at(14.1) })).toContain(account_id)
    expect(await leftOf(account_id)).toEqual([])
    expect(await leftOf(bystander.account_id)).not.toEqual([])
    const { id } = await asWorker((trx) =>
      trx.selectFrom("app_user").select("id").where("id", "=", person.id).executeTakeFirstOrThrow(),
    )
    expect(id).toBe(person.id)
  })

  it("pays no further period, pays on when it is taken back, and its subscription ends with it", async () => {
    const subscriber = await createSubscriber()
    const ctx = subscriber.as("owner")
    const account_id = ctx.account_id
    await visit((await startCheckout({ ctx, input: { plan: "storefront" } })).url, { card: "pays" })
    // As its event would do, which the API alone does not receive.
    const id = await asWorker(async (trx) => {
      const { stripe_customer_id } = await trx
        .selectFrom("account")
        .select("stripe_customer_id")
        .where("id", "=", account_id)
        .executeTakeFirstOrThrow()
      await syncAccount(trx, { account_id, customer: stripe_customer_id! }, ctx.now)
      const stored = await trx
        .selectFrom("subscription")
        .select("stripe_subscription_id")
        .where("account_id", "=", account_id)
        .executeTakeFirstOrThrow()
      return stored.stripe_subscription_id
    })
    const renews = async () => !(await standInClient().subscriptions.retrieve(id)).cancel_at_period_end
    const input = await asWorker((trx) =>
      trx.selectFrom("account").select("name").where("id", "=", account_id).executeTakeFirstOrThrow(),
    )
    await closeAccount({ ctx, input })
    expect(await renews()).toBe(false)
    await reopenAccount({ ctx })
    expect(await renews()).toBe(true)
    await closeAccount({ ctx, input })
    const now = new Date(ctx.now.getTime() + 15 * day_ms)
    expect(await deleteClosedAccounts({ now })).toContain(account_id)
    expect((await standInClient().subscriptions.retrieve(id)).status).toBe("canceled")
  })

  it("is the only one whose ledger and trail the worker may delete", async () => {
    const { account_id } = await owned()
    await asWorker((trx) =>
      trx
        .insertInto("audit_log")
        .values({
          account_id,
          id: `audit_${account_id}`,
          actor_kind: "system",
          actor_id: null,
          action: "x",
          target: null,
          ip: null,
          request_id: null,
        })
        .execute(),
    )
    const { numDeletedRows } = await asWorker((trx) =>
      trx.deleteFrom("audit_log").where("account_id", "=", account_id).executeTakeFirst(),
    )
    expect(numDeletedRows).toBe(0n)
  })
})

/** Tables that still hold a row of the account. */
async function leftOf(account_id: string): Promise<string[]> {
  return asWorker(async (trx) => {
    const { rows: tables } = await sql<{
      name: string
    }>`select table_name as name from information_schema.columns
      join pg_class on relname = table_name and relkind in ('r', 'p') and not relispartition
        and relnamespace = 'public'::regnamespace
      where table_schema = 'public' and column_name = 'account_id'
        and has_table_privilege(pg_class.oid, 'select')`.execute(trx)
    expect(tables.length).toBeGreaterThan(15)
    const left: string[] = []
    for (const { name: table } of tables) {
      const { rows } =
        await sql`select 1 from ${sql.table(table)} where account_id = ${account_id} limit 1`.execute(trx)
      if (rows.length > 0) left.push(table)
    }
    return left
  })
}
