import { randomUUID } from "node:crypto"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools, withTenant } from "@/db"
import {
  addressToReset,
  addressToVerify,
  endSession,
  findMembership,
  listMemberships,
  readSession,
  renameAccount,
  requestPasswordReset,
  resetPassword,
  signIn,
  signUp,
  type Visitor,
  verifyEmail,
} from "@/lib/accounts"
import { linkIn, mailsTo, waitForMail } from "../support/mailbox"
import { takeSettings } from "../support/stack"

beforeAll(takeSettings)
afterAll(closePools)

const password = "tarn moss valve lantern"

function newcomer() {
  const id = randomUUID().slice(0, 8)
  return { email: `wren-${id}@fernhollow.test`, name: "Wren", organisation: `Shop ${id}` }
}

/** A visitor of its own place, so that no test throttles another. */
function visitor(shift_ms = 0, ip = `2001:db8::${randomUUID().slice(0, 4)}`): Visitor {
  return { now: new Date(Date.now() + shift_ms), ip, user_agent: "test" }
}

function tokenIn(link: string): string {
  return new URL(link).searchParams.get("token") ?? ""
}

async function letterOf(email: string, subject: string): Promise<string> {
  return tokenIn(linkIn(await waitForMail(email, subject)))
}

/** Someone who has signed up and confirmed their address. */
async function member() {
  const person = newcomer()
  await signUp({ visitor: visitor(), input: { ...person, password } })
  const token = await letterOf(person.email, "Confirm")
  return { ...person, ...(await verifyEmail({ visitor: visitor(), input: { token } })) }
}

describe("signing up", () => {
  it("opens an account with its owner and a session once the address is confirmed, not before", async () => {
    const person = newcomer()
    await signUp({ visitor: visitor(), input: { ...person, password } })
    const before = await asWorker((trx) =>
      trx.selectFrom("app_user").select("id").where("email", "=", person.email).execute(),
    )
    expect(before).toEqual([])

    const token = await letterOf(person.email, "Confirm")
    expect(await addressToVerify({ visitor: visitor(), input: { token } })).toBe(person.email)
    const opened = await verifyEmail({ visitor: visitor(), input: { token } })
    expect((await readSession(opened.token, new Date()))?.person).toMatchObject({ email: person.email })
    const [membership] = await listMemberships({ user_id: opened.person.id })
    expect(membership).toMatchObject({ role: "owner", account: { name: person.organisation, plan: "nano" } })
    const acts = await withTenant(membership!.account.id, (trx) =>
      trx.selectFrom("audit_log").select(["action", "actor_id"]).execute(),
    )
    expect(acts).toEqual([{ action: "account.created", actor_id: opened.person.id }])
  })

  it("takes a confirmation link once", async () => {
    const person = newcomer()
    await signUp({ visitor: visitor(), input: { ...person, password } })
    const token = await letterOf(person.email, "Confirm")
    await verifyEmail({ visitor: visitor(), input: { token } })
    await expect(verifyEmail({ visitor: visitor(), input: { token } })).rejects.toMatchObject({
      code: "not_found",
    })
  })

  it("takes no confirmation link that is a day old, or that a newer one replaced", async () => {
    const person = newcomer()
    await signUp({ visitor: visitor(), input: { ...person, password } })
    const first = await letterOf(person.email, "Confirm")
    const day_ms = 24 * 3_600_000
    expect(
      await addressToVerify({ visitor: visitor(day_ms + 1000), input: { token: first } }),
    ).toBeUndefined()
    expect(await addressToVerify({ visitor: visitor(day_ms - 60_000), input: { token: first } })).toBe(
      person.email,
    )
    await signUp({ visitor: visitor(), input: { ...person, password } })
    expect(await addressToVerify({ visitor: visitor(), input: { token: first } })).toBeUndefined()
  })

  it("answers a known address the same, writes to it, and changes nothing", async () => {
    const known = await member()
    const outcome = await signUp({
      visitor: visitor(),
      input: { ...newcomer(), email: known.email.toUpperCase(), password: "another good password" },
    })
    expect(outcome).toBeUndefined()
    expect((await waitForMail(known.email, "already have")).text).toContain("/signin")
    expect(
      await signIn({ visitor: visitor(), input: { email: known.email, password: "another good password" } }),
    ).toBeUndefined()
  })

  it("writes to an address five times an hour at most", async () => {
    const person = newcomer()
    for (let attempt = 0; attempt < 7; attempt++) {
      await signUp({ visitor: visitor(), input: { ...person, password } })
    }
    await expect.poll(async () => (await mailsTo(person.email)).length, { timeout: 15_000 }).toBe(5)
    await new Promise((resolve) => setTimeout(resolve, 1_000))
    expect(await mailsTo(person.email)).toHaveLength(5)
  })

  it("refuses a weak password at its field", async () => {
    await expect(
      signUp({ visitor: visitor(), input: { ...newcomer(), password: "short" } }),
    ).rejects.toMatchObject({ code: "validation_failed", errors: [{ pointer: "/password" }] })
  })
})

describe("signing in", () => {
  it("gives another session each time, and keeps neither's secret", async () => {
    const { email, person } = await member()
    const one = await signIn({ visitor: visitor(), input: { email, password } })
    const other = await signIn({ visitor: visitor(), input: { email: ` ${email.toUpperCase()}`, password } })
    expect(one!.token).not.toBe(other!.token)
    const stored = await asWorker((trx) =>
      trx.selectFrom("session").selectAll().where("user_id", "=", person.id).execute(),
    )
    expect(stored.length).toBe(3)
    expect(JSON.stringify(stored)).not.toContain(one!.token)
  })

  it("refuses a wrong password and an unknown address alike", async () => {
    const { email } = await member()
    expect(await signIn({ visitor: visitor(), input: { email, password: `${password}x` } })).toBeUndefined()
    expect(await signIn({ visitor: visitor(), input: { email: newcomer().email, password } })).toBeUndefined()
  })

  it("says that the address waits to be confirmed only to whoever knows the password", async () => {
    const person = newcomer()
    await signUp({ visitor: visitor(), input: { ...person, password } })
    await expect(
      signIn({ visitor: visitor(), input: { email: person.email, password } }),
    ).rejects.toMatchObject({
      code: "conflict",
    })
    expect(
      await signIn({ visitor: visitor(), input: { email: person.email, password: `${password}x` } }),
    ).toBeUndefined()
  })

  it("makes whoever fails five times from one place wait, longer each time, and nobody else", async () => {
    const { email } = await member()
    const place = visitor().ip
    const wrong = { email, password: "wrong wrong wrong wrong" }
    for (let attempt = 0; attempt < 5; attempt++) await signIn({ visitor: visitor(0, place), input: wrong })
    await expect(signIn({ visitor: visitor(0, place), input: wrong })).rejects.toMatchObject({
      code: "rate_limited",
      retryAfterS: 10,
    })
    await expect(signIn({ visitor: visitor(0, place), input: { email, password } })).rejects.toMatchObject({
      code: "rate_limited",
    })
    expect(await signIn({ visitor: visitor(11_000, place), input: wrong })).toBeUndefined()
    await expect(signIn({ visitor: visitor(12_000, place), input: wrong })).rejects.toMatchObject({
      retryAfterS: 19,
    })
    expect(await signIn({ visitor: visitor(), input: { email, password } })).toBeDefined()
    expect(await signIn({ visitor: visitor(12_000, place), input: { email, password } })).toBeDefined()
  })

  it("cannot be tried a hundred times at once", async () => {
    const { email } = await member()
    const place = visitor().ip
    const tries = Array.from({ length: 20 }, () =>
      signIn({ visitor: visitor(0, place), input: { email, password: "wrong wrong wrong wrong" } }).then(
        () => "tried",
        () => "refused",
      ),
    )
    const outcomes = await Promise.all(tries)
    expect(outcomes.filter((outcome) => outcome === "tried")).toHaveLength(5)
  })
})

describe("a session", () => {
  it("is dead at once when it is ended", async () => {
    const { token } = await member()
    expect(await readSession(token, new Date())).toBeDefined()
    await endSession(token)
    expect(await readSession(token, new Date())).toBeUndefined()
  })

  it("ends after 12 idle hours, and after 30 days however busy", async () => {
    const { token } = await member()
    const hour_ms = 3_600_000
    const at = (hours: number) => new Date(Date.now() + hours * hour_ms)
    expect(await readSession(token, at(12.1))).toBeUndefined()
    for (let hours = 0; hours < 30 * 24 - 1; hours += 11)
      expect(await readSession(token, at(hours))).toBeDefined()
    expect(await readSession(token, at(30 * 24 + 0.1))).toBeUndefined()
  })

  it.each(["", "x", "a".repeat(43), `${"a".repeat(42)}!`, "a".repeat(5000)])("is not %j", async (token) => {
    expect(await readSession(token, new Date())).toBeUndefined()
  })
})

describe("a forgotten password", () => {
  it("is set anew by a link that works once; every session ends, the owner is told, the trail shows it", async () => {
    const { email, token: session, person } = await member()
    await requestPasswordReset({ visitor: visitor(), input: { email } })
    const token = await letterOf(email, "new password")
    const input = { token, password: "lantern valve moss tarn" }
    await expect(
      resetPassword({ visitor: visitor(), input: { token, password: "short" } }),
    ).rejects.toMatchObject({ code: "validation_failed" })
    await resetPassword({ visitor: visitor(), input })
    expect(await readSession(session, new Date())).toBeUndefined()
    expect(await signIn({ visitor: visitor(), input: { email, password } })).toBeUndefined()
    expect(await signIn({ visitor: visitor(), input: { email, password: input.password } })).toBeDefined()
    await expect(resetPassword({ visitor: visitor(), input })).rejects.toMatchObject({ code: "not_found" })
    await waitForMail(email, "was changed")
    const [membership] = await listMemberships({ user_id: person.id })
    const acts = await withTenant(membership!.account.id, (trx) =>
      trx.selectFrom("audit_log").select("action").execute(),
    )
    expect(acts).toContainEqual({ action: "person.password_reset" })
  })

  it("opens an address again that a hundred failures had closed", async () => {
    const { email } = await member()
    await asWorker((trx) =>
      trx
        .insertInto("sign_in_failure")
        .values(Array.from({ length: 100 }, () => ({ email, ip: "2001:db8::1" })))
        .execute(),
    )
    await expect(signIn({ visitor: visitor(), input: { email, password } })).rejects.toMatchObject({
      code: "rate_limited",
    })
    await requestPasswordReset({ visitor: visitor(), input: { email } })
    const token = await letterOf(email, "new password")
    await resetPassword({ visitor: visitor(), input: { token, password: "lantern valve moss tarn" } })
    expect(
      await signIn({ visitor: visitor(), input: { email, password: "lantern valve moss tarn" } }),
    ).toBeDefined()
  })

  it("is no longer set by a link that is half an hour old", async () => {
    const { email } = await member()
    await requestPasswordReset({ visitor: visitor(), input: { email } })
    const token = await letterOf(email, "new password")
    expect(await addressToReset({ visitor: visitor(29 * 60_000), input: { token } })).toBe(email)
    expect(await addressToReset({ visitor: visitor(30 * 60_000 + 1000), input: { token } })).toBeUndefined()
    expect(await addressToVerify({ visitor: visitor(), input: { token } })).toBeUndefined()
  })

  it("sends nothing to an unknown address and says nothing of it", async () => {
    const { email } = newcomer()
    expect(await requestPasswordReset({ visitor: visitor(), input: { email } })).toBeUndefined()
    await new Promise((resolve) => setTimeout(resolve, 1_500))
    expect(await mailsTo(email)).toEqual([])
  })
})

describe("an account", () => {
  it("does not exist for whoever is not in it", async () => {
    const one = await member()
    const other = await member()
    const [membership] = await listMemberships({ user_id: one.person.id })
    const { slug } = membership!.account
    expect(await findMembership({ user_id: one.person.id, slug })).toBeDefined()
    expect(await findMembership({ user_id: other.person.id, slug })).toBeUndefined()
  })

  it("gets a slug of its own when its name is taken", async () => {
    const organisation = `Twin ${randomUUID().slice(0, 6)}`
    const slugs: string[] = []
    for (let twin = 0; twin < 2; twin++) {
      const person = { ...newcomer(), organisation }
      await signUp({ visitor: visitor(), input: { ...person, password } })
      const token = await letterOf(person.email, "Confirm")
      const opened = await verifyEmail({ visitor: visitor(), input: { token } })
      const [membership] = await listMemberships({ user_id: opened.person.id })
      slugs.push(membership!.account.slug)
    }
    expect(slugs[1]).toBe(`${slugs[0]}-2`)
  })

  it("is renamed by an owner alone", async () => {
    const { person } = await member()
    const [membership] = await listMemberships({ user_id: person.id })
    const account_id = membership!.account.id
    const as = (role: "owner" | "developer") => ({
      account_id,
      actor: { kind: "user", id: person.id, role } as const,
      now: new Date(),
    })
    await expect(renameAccount({ ctx: as("developer"), input: { name: "Mine" } })).rejects.toMatchObject({
      code: "forbidden",
    })
    await renameAccount({ ctx: as("owner"), input: { name: "Fern and Hollow" } })
    expect((await listMemberships({ user_id: person.id }))[0]!.account.name).toBe("Fern and Hollow")
  })
})
