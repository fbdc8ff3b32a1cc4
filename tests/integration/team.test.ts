import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools } from "@/db"
import { findMembership, readSession } from "@/lib/accounts"
import { listActs } from "@/lib/audit"
import type { PlanId } from "@/lib/billing/plans"
import {
  acceptInvitation,
  changeRole,
  invite,
  leaveAccount,
  listInvitations,
  listTeam,
  readInvitation,
  removeMember,
  resendInvitation,
  revokeInvitation,
  signUpByInvitation,
} from "@/lib/team"
import { createTestAccount } from "../support/account"
import { linkIn, mailsTo, waitForMail } from "../support/mailbox"
import { createMember, createPerson, newAddress, PASSWORD, visitor } from "../support/people"
import { takeSettings } from "../support/stack"

beforeAll(takeSettings)
afterAll(closePools)

const hour_ms = 3_600_000

/** An account with one owner, who acts. */
async function team(plan: PlanId = "brand") {
  const account = await createTestAccount({ plan })
  const owner = await createMember(account.ctx.account_id, "owner")
  return { account_id: account.ctx.account_id, slug: account.slug, ...owner }
}

async function letterTo(email: string): Promise<string> {
  return new URL(linkIn(await waitForMail(email, "Join"))).pathname.split("/").at(-1)!
}

describe("an invitation", () => {
  it("makes a sign-in and a member of an address that has none, once", async () => {
    const { ctx, slug } = await team()
    const email = newAddress()
    await invite({ ctx, input: { email: ` ${email.toUpperCase()}`, role: "developer" } })
    const token = await letterTo(email)
    expect(await readInvitation({ visitor: visitor(), input: { token } })).toMatchObject({
      email,
      slug,
      role: "developer",
      has_sign_in: false,
    })
    const input = { token, name: "Guest", password: PASSWORD }
    await expect(
      signUpByInvitation({ visitor: visitor(), input: { ...input, password: "short" } }),
    ).rejects.toMatchObject({ code: "validation_failed" })
    const opened = await signUpByInvitation({ visitor: visitor(), input })
    expect((await readSession(opened.token, new Date()))?.person).toMatchObject({ email })
    expect(await findMembership({ user_id: opened.person.id, slug })).toMatchObject({ role: "developer" })
    await expect(signUpByInvitation({ visitor: visitor(), input })).rejects.toMatchObject({
      code: "not_found",
    })
    expect(await listInvitations({ ctx })).toEqual([])
    const acts = (await listActs({ ctx, input: { limit: 5 } })).map(({ action }) => action)
    expect(acts).toEqual(["team.joined", "team.invited"])
  })

  it("is accepted by the person who was written to and by nobody else", async () => {
    const { ctx, slug } = await team()
    const [invited, other] = [await createPerson(), await createPerson()]
    await invite({ ctx, input: { email: invited.email, role: "viewer" } })
    const token = await letterTo(invited.email)
    const accept = (person: typeof invited) =>
      acceptInvitation({ visitor: visitor(), person, input: { token } })
    await expect(accept(other)).rejects.toMatchObject({ code: "forbidden" })
    await expect(
      signUpByInvitation({ visitor: visitor(), input: { token, name: "Guest", password: PASSWORD } }),
    ).rejects.toMatchObject({ code: "conflict" })
    expect(await accept(invited)).toEqual({ slug })
    await expect(accept(invited)).rejects.toMatchObject({ code: "not_found" })
    expect(await findMembership({ user_id: invited.id, slug })).toMatchObject({ role: "viewer" })
  })

  it("lets one in when two accept it at once", async () => {
    const { ctx, slug } = await team()
    const email = newAddress()
    await invite({ ctx, input: { email, role: "viewer" } })
    const input = { token: await letterTo(email), name: "Guest", password: PASSWORD }
    const outcomes = await Promise.allSettled(
      Array.from({ length: 4 }, () => signUpByInvitation({ visitor: visitor(), input })),
    )
    expect(outcomes.filter(({ status }) => status === "fulfilled")).toHaveLength(1)
    expect((await listTeam({ ctx })).filter((member) => member.email === email)).toHaveLength(1)
    expect(slug).not.toBe("")
  })

  it("works 72 hours; sent again it works anew and the old link is dead", async () => {
    const { ctx } = await team()
    const email = newAddress()
    const { id } = await invite({ ctx, input: { email, role: "viewer" } })
    const first = await letterTo(email)
    const read = (token: string, shift_ms: number) =>
      readInvitation({ visitor: visitor(shift_ms), input: { token } })
    expect(await read(first, 72 * hour_ms - 60_000)).toBeDefined()
    expect(await read(first, 72 * hour_ms + 1000)).toBeUndefined()
    const later = { ...ctx, now: new Date(Date.now() + 80 * hour_ms) }
    await resendInvitation({ ctx: later, input: { invitation_id: id } })
    await expect.poll(async () => (await mailsTo(email)).length, { timeout: 15_000 }).toBe(2)
    const second = await letterTo(email)
    expect(second).not.toBe(first)
    expect(await read(first, 0)).toBeUndefined()
    expect(await read(second, 100 * hour_ms)).toBeDefined()
  })

  it("taken back is worth nothing", async () => {
    const { ctx } = await team()
    const email = newAddress()
    const { id } = await invite({ ctx, input: { email, role: "viewer" } })
    const token = await letterTo(email)
    await revokeInvitation({ ctx, input: { invitation_id: id } })
    expect(await readInvitation({ visitor: visitor(), input: { token } })).toBeUndefined()
    await expect(revokeInvitation({ ctx, input: { invitation_id: id } })).rejects.toMatchObject({
      code: "not_found",
    })
  })

  it("goes to nobody who belongs to the account or is invited already", async () => {
    const { ctx, person } = await team()
    const email = newAddress()
    await invite({ ctx, input: { email, role: "viewer" } })
    for (const known of [email, person.email]) {
      await expect(invite({ ctx, input: { email: known, role: "viewer" } })).rejects.toMatchObject({
        code: "conflict",
        errors: [{ pointer: "/email" }],
      })
    }
  })

  it("needs a place in the plan, counted one at a time, until it grows too old", async () => {
    const { ctx } = await team("nano")
    const outcomes = await Promise.allSettled(
      Array.from({ length: 3 }, () => invite({ ctx, input: { email: newAddress(), role: "viewer" } })),
    )
    expect(outcomes.filter(({ status }) => status === "fulfilled")).toHaveLength(1)
    await expect(invite({ ctx, input: { email: newAddress(), role: "viewer" } })).rejects.toMatchObject({
      code: "plan_limit_reached",
    })
    const later = { ...ctx, now: new Date(Date.now() + 73 * hour_ms) }
    await invite({ ctx: later, input: { email: newAddress(), role: "viewer" } })
  })

  it("is an owner's alone, and another account's is not found", async () => {
    const { ctx, account_id } = await team()
    const developer = await createMember(account_id, "developer")
    const email = newAddress()
    await expect(invite({ ctx: developer.ctx, input: { email, role: "viewer" } })).rejects.toMatchObject({
      code: "forbidden",
    })
    const { id } = await invite({ ctx, input: { email, role: "viewer" } })
    const stranger = await team()
    for (const act of [resendInvitation, revokeInvitation]) {
      await expect(act({ ctx: stranger.ctx, input: { invitation_id: id } })).rejects.toMatchObject({
        code: "not_found",
      })
    }
  })

  it.each(["", "x", "acct_01.abc", `acct_${"0".repeat(26)}.${"a".repeat(43)}`])(
    "is not the token %j",
    async (token) => {
      expect(await readInvitation({ visitor: visitor(), input: { token } })).toBeUndefined()
    },
  )
})

describe("a member", () => {
  it("gets another role, is told, and acts by it at once", async () => {
    const { ctx, account_id, slug } = await team()
    const { person } = await createMember(account_id, "viewer")
    await changeRole({ ctx, input: { user_id: person.id, role: "developer" } })
    expect(await findMembership({ user_id: person.id, slug })).toMatchObject({ role: "developer" })
    await waitForMail(person.email, "now developer")
  })

  it("is removed, is told, and sees the account no more", async () => {
    const { ctx, account_id, slug } = await team()
    const { person } = await createMember(account_id, "developer")
    await removeMember({ ctx, input: { user_id: person.id } })
    expect(await findMembership({ user_id: person.id, slug })).toBeUndefined()
    await waitForMail(person.email, "no longer belong")
  })

  it("of another account is not found", async () => {
    const { person } = await team()
    const { ctx } = await team()
    await expect(changeRole({ ctx, input: { user_id: person.id, role: "viewer" } })).rejects.toMatchObject({
      code: "not_found",
    })
    await expect(removeMember({ ctx, input: { user_id: person.id } })).rejects.toMatchObject({
      code: "not_found",
    })
  })

  it("who owns nothing changes nobody, and may leave", async () => {
    const { account_id, person, slug } = await team()
    const viewer = await createMember(account_id, "viewer")
    await expect(
      changeRole({ ctx: viewer.ctx, input: { user_id: viewer.person.id, role: "owner" } }),
    ).rejects.toMatchObject({ code: "forbidden" })
    await expect(removeMember({ ctx: viewer.ctx, input: { user_id: person.id } })).rejects.toMatchObject({
      code: "forbidden",
    })
    await leaveAccount({ ctx: viewer.ctx })
    expect(await findMembership({ user_id: viewer.person.id, slug })).toBeUndefined()
  })
})

describe("the last owner", () => {
  it("cannot leave, be demoted or be removed", async () => {
    const { ctx, person } = await team()
    const user_id = person.id
    await expect(leaveAccount({ ctx })).rejects.toMatchObject({ code: "conflict" })
    await expect(changeRole({ ctx, input: { user_id, role: "viewer" } })).rejects.toMatchObject({
      code: "conflict",
    })
    await expect(removeMember({ ctx, input: { user_id } })).rejects.toMatchObject({ code: "conflict" })
  })

  it("is there still when two owners leave, or demote each other, at once", async () => {
    for (const round of [0, 1, 2, 3]) {
      const one = await team()
      const other = await createMember(one.account_id, "owner")
      const outcomes = await Promise.allSettled(
        round % 2 === 0
          ? [leaveAccount({ ctx: one.ctx }), leaveAccount({ ctx: other.ctx })]
          : [
              changeRole({ ctx: one.ctx, input: { user_id: other.person.id, role: "viewer" } }),
              changeRole({ ctx: other.ctx, input: { user_id: one.person.id, role: "viewer" } }),
            ],
      )
      expect(outcomes.map(({ status }) => status).sort()).toEqual(["fulfilled", "rejected"])
      const { count } = await asWorker((trx) =>
        trx
          .selectFrom("membership")
          .select((select) => select.fn.countAll<number>().as("count"))
          .where("account_id", "=", one.account_id)
          .where("role", "=", "owner")
          .executeTakeFirstOrThrow(),
      )
      expect(count).toBe(1)
    }
  })
})
