import pg from "pg"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { closePools } from "@/db"
import { createKey, remindOfExpiry, revokeKey, rotateKey } from "@/lib/keys"
import { mailsTo, waitForMail } from "../support/mailbox"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber, type Subscriber } from "../support/subscriber"

let superuser: pg.Client

// No role of the product may move the end of a key, so the tests do it as the superuser of their own cluster.
beforeAll(async () => {
  takeSettings()
  superuser = new pg.Client({ connectionString: stack().databaseUrls.superuser })
  await superuser.connect()
})

afterAll(async () => {
  await superuser.end()
  await closePools()
})

const day_ms = 86_400_000
const days = (count: number) => new Date(Date.now() + count * day_ms)

/** A key made `age` days ago that ends in `left` days. */
async function keyOf(account: Subscriber, name: string, { age, left }: { age: number; left: number }) {
  const { key } = await createKey({
    ctx: { ...account.as("owner"), now: days(-age) },
    input: { kind: "server", mode: "live", name, scopes: ["calculate"], expires_at: days(left) },
  })
  return key
}

/** Names of the keys that the owner was reminded of so far, each as often as it was. */
async function remindedOf({ email }: Subscriber): Promise<string[]> {
  const mails = (await mailsTo(email)).filter(({ subject }) => subject.includes("expires soon"))
  return mails.map(({ text }) => /“(.+)”/.exec(text)?.[1] ?? "").sort()
}

/** Runs the reminder and waits until its mails, and one that was queued after them, have come. */
async function runReminder(account: Subscriber): Promise<void> {
  await remindOfExpiry()
  const last = await createSubscriber()
  await keyOf(last, "Last", { age: 30, left: 0.5 })
  await remindOfExpiry()
  await waitForMail(last.email, "expires soon")
  expect(account.email).not.toBe(last.email)
}

/** Lets time pass for a key until `left` days remain: its end stays for what was noted, and comes nearer to the clock. */
async function comesToItsEnd(key_id: string, left: number): Promise<void> {
  for (const table of ["key_reminder", "api_key"])
    await superuser.query(
      `update ${table} set expires_at = $1 where ${table === "api_key" ? "id" : "key_id"} = $2`,
      [days(left), key_id],
    )
}

describe("the owner of a key that ends", () => {
  it("is reminded 14, 7 and 1 days before, once each", async () => {
    const account = await createSubscriber()
    await keyOf(account, "In 14", { age: 60, left: 13.9 })
    await keyOf(account, "In 7", { age: 60, left: 6.9 })
    await keyOf(account, "In 1", { age: 60, left: 0.9 })
    await keyOf(account, "In 15", { age: 60, left: 15 })
    await runReminder(account)
    await runReminder(account)
    expect(await remindedOf(account)).toEqual(["In 1", "In 14", "In 7"])
  })

  it("is reminded of one key at each mark as its end comes nearer", async () => {
    const account = await createSubscriber()
    const key = await keyOf(account, "Nearing", { age: 60, left: 13 })
    await runReminder(account)
    for (const left of [6, 0.5]) {
      await comesToItsEnd(key.id, left)
      await runReminder(account)
    }
    expect(await remindedOf(account)).toEqual(["Nearing", "Nearing", "Nearing"])
  })

  it("reads when it ends, and where to mend it", async () => {
    const account = await createSubscriber()
    const { expires_at, last4 } = await keyOf(account, "Till", { age: 60, left: 5 })
    await runReminder(account)
    const { text } = await waitForMail(account.email, "expires soon")
    const date = expires_at!.toLocaleDateString("en-GB", { dateStyle: "long", timeZone: "UTC" })
    expect(text).toContain(`ending in ${last4}, expires on ${date}`)
    expect(text).toContain(`/portal/${account.slug}/keys`)
  })

  it("is not reminded of a mark before which the key was not there, nor of a key that is revoked or over", async () => {
    const account = await createSubscriber()
    await keyOf(account, "Short", { age: 0, left: 3 })
    const revoked = await keyOf(account, "Revoked", { age: 60, left: 5 })
    await revokeKey({ ctx: account.as("owner"), input: { key_id: revoked.id } })
    await keyOf(account, "Over", { age: 60, left: -1 })
    await runReminder(account)
    expect(await remindedOf(account)).toEqual([])
  })

  it("is reminded of a key that has a successor on the last day alone", async () => {
    const account = await createSubscriber()
    const [early, late] = [
      await keyOf(account, "Rotated early", { age: 60, left: 90 }),
      await keyOf(account, "Rotated late", { age: 60, left: 90 }),
    ]
    await rotateKey({ ctx: account.as("owner"), input: { key_id: early.id, overlap_h: 72 } })
    await rotateKey({ ctx: account.as("owner"), input: { key_id: late.id, overlap_h: 20 } })
    await runReminder(account)
    expect(await remindedOf(account)).toEqual(["Rotated late"])
    expect((await waitForMail(account.email, "expires soon")).text).toContain("has its successor")
  })
})
