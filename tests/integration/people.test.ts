import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools } from "@/db"
import {
  addressToSignIn,
  beginSecondFactor,
  changePassword,
  confirmSecondFactor,
  describeSecondFactor,
  endOtherSessions,
  endOwnSession,
  listOwnSessions,
  type Person,
  readSession,
  removeSecondFactor,
  renewRecoveryCodes,
  requestSignInLink,
  requireFresh,
  signIn,
  signInByLink,
  stepUp,
} from "@/lib/accounts"
import { listActs } from "@/lib/audit"
import { createTestAccount } from "../support/account"
import { linkIn, mailsTo, waitForMail } from "../support/mailbox"
import { createMember, createPerson, newAddress, PASSWORD, visitor } from "../support/people"
import { codeOf } from "../support/second-factor"
import { takeSettings } from "../support/stack"

beforeAll(takeSettings)
afterAll(closePools)

/** Someone who is signed in, as they act on their own sign-in. */
async function signedIn(person: Person) {
  const opened = await signIn({ visitor: visitor(), input: { email: person.email, password: PASSWORD } })
  const { token } = opened!
  const session = (await readSession(token, new Date()))!
  return { person, session_id: session.session_id, token, visitor: visitor() }
}

async function withSecondFactor() {
  const person = await createPerson()
  const self = await signedIn(person)
  const { secret } = await beginSecondFactor(self)
  const { recovery_codes } = await confirmSecondFactor({ ...self, input: { code: codeOf(secret) } })
  return { ...self, secret, recovery_codes, input: { email: person.email, password: PASSWORD } }
}

async function linkTo(email: string): Promise<string> {
  await requestSignInLink({ visitor: visitor(), input: { email } })
  return new URL(linkIn(await waitForMail(email, "link to sign in"))).searchParams.get("token")!
}

describe("a second factor", () => {
  it("counts for nothing until a code of it was shown, and is kept sealed", async () => {
    const person = await createPerson()
    const self = await signedIn(person)
    const { secret, uri } = await beginSecondFactor(self)
    expect(uri).toContain(secret)
    await expect(confirmSecondFactor({ ...self, input: { code: "000000" } })).rejects.toMatchObject({
      code: "validation_failed",
      errors: [{ pointer: "/code" }],
    })
    expect(
      await signIn({ visitor: visitor(), input: { email: person.email, password: PASSWORD } }),
    ).toBeDefined()
    const { seed } = await asWorker((trx) =>
      trx
        .selectFrom("second_factor")
        .select("seed")
        .where("user_id", "=", person.id)
        .executeTakeFirstOrThrow(),
    )
    expect(seed.toString("utf8")).not.toContain(secret)
    expect((await describeSecondFactor({ user_id: person.id })).since).toBeNull()
  })

  it("leaves the password alone worth no session, and takes a code of the app once", async () => {
    const { secret, input, person } = await withSecondFactor()
    await expect(signIn({ visitor: visitor(), input })).rejects.toMatchObject({
      code: "second_factor_required",
    })
    expect(
      await signIn({ visitor: visitor(), input: { ...input, password: "wrong wrong wrong" } }),
    ).toBeUndefined()
    const code = codeOf(secret, 1)
    const tries = await Promise.allSettled(
      Array.from({ length: 4 }, () => signIn({ visitor: visitor(), input: { ...input, code } })),
    )
    expect(tries.filter(({ status }) => status === "fulfilled")).toHaveLength(1)
    await expect(signIn({ visitor: visitor(), input: { ...input, code } })).rejects.toMatchObject({
      code: "validation_failed",
    })
    const sessions = await asWorker((trx) =>
      trx.selectFrom("session").select("id").where("user_id", "=", person.id).execute(),
    )
    expect(sessions).toHaveLength(2)
  })

  it("takes no code that was used to set it up, and none of the time before", async () => {
    const { secret, input } = await withSecondFactor()
    for (const shift of [0, -1]) {
      await expect(
        signIn({ visitor: visitor(), input: { ...input, code: codeOf(secret, shift) } }),
      ).rejects.toMatchObject({ code: "validation_failed" })
    }
  })

  it("is stood in for by each recovery code once, of which the person is told", async () => {
    const { recovery_codes, input, person } = await withSecondFactor()
    const code = recovery_codes[3]!.toUpperCase()
    expect(await signIn({ visitor: visitor(), input: { ...input, code } })).toBeDefined()
    await expect(signIn({ visitor: visitor(), input: { ...input, code } })).rejects.toMatchObject({
      code: "validation_failed",
    })
    expect((await waitForMail(person.email, "recovery code")).text).toContain("9 are left")
    expect(await describeSecondFactor({ user_id: person.id })).toMatchObject({ recovery_codes_left: 9 })
  })

  it("cannot be guessed: wrong codes make whoever tries wait", async () => {
    const { input } = await withSecondFactor()
    const place = visitor().ip
    for (let attempt = 0; attempt < 5; attempt++) {
      await expect(
        signIn({ visitor: visitor(0, place), input: { ...input, code: "000000" } }),
      ).rejects.toMatchObject({ code: "validation_failed" })
    }
    await expect(
      signIn({ visitor: visitor(0, place), input: { ...input, code: "000000" } }),
    ).rejects.toMatchObject({ code: "rate_limited" })
  })

  it("ends every other session when it is set up and when it is removed, and the trail shows it", async () => {
    const account = await createTestAccount()
    const { person } = await createMember(account.ctx.account_id, "owner")
    const [self, other] = [await signedIn(person), await signedIn(person)]
    const { secret } = await beginSecondFactor(self)
    await confirmSecondFactor({ ...self, input: { code: codeOf(secret) } })
    expect(await readSession(other.token, new Date())).toBeUndefined()
    expect(await readSession(self.token, new Date())).toMatchObject({ second_factor: true })
    await expect(beginSecondFactor(self)).rejects.toMatchObject({ code: "conflict" })
    await removeSecondFactor(self)
    expect(await readSession(self.token, new Date())).toMatchObject({ second_factor: false })
    const acts = (await listActs({ ctx: account.ctx, input: { limit: 5 } })).map(({ action }) => action)
    expect(acts).toEqual(["person.second_factor_removed", "person.second_factor_set_up"])
    await waitForMail(person.email, "was removed")
  })

  it("gets new recovery codes, which void the old ones", async () => {
    const factor = await withSecondFactor()
    const { recovery_codes } = await renewRecoveryCodes(factor)
    await expect(
      signIn({ visitor: visitor(), input: { ...factor.input, code: factor.recovery_codes[0] } }),
    ).rejects.toMatchObject({ code: "validation_failed" })
    expect(
      await signIn({ visitor: visitor(), input: { ...factor.input, code: recovery_codes[0] } }),
    ).toBeDefined()
  })

  it("cannot be removed by a platform admin", async () => {
    const person = await createPerson({ is_admin: true })
    await expect(removeSecondFactor(await signedIn(person))).rejects.toMatchObject({ code: "forbidden" })
  })
})

describe("being fresh", () => {
  const minutes = (count: number) => new Date(Date.now() + count * 60_000)

  it("lasts ten minutes from the sign-in, and anew from a password or a code", async () => {
    const factor = await withSecondFactor()
    const read = async () => (await readSession(factor.token, new Date()))!
    requireFresh(await read(), minutes(9.9))
    expect(() => {
      requireFresh({ stepped_up_at: new Date() }, minutes(10.1))
    }).toThrowError(expect.objectContaining({ code: "step_up_required" }))
    const later = { ...factor, visitor: visitor(15 * 60_000) }
    await stepUp({ ...later, input: { password: PASSWORD } })
    requireFresh(await read(), minutes(24))
    await stepUp({ ...factor, input: { code: factor.recovery_codes[0]! } })
    requireFresh(await read(), minutes(9))
  })

  it("is not had by a wrong password, a wrong code, or another's code", async () => {
    const [factor, other] = [await withSecondFactor(), await withSecondFactor()]
    for (const input of [
      { password: `${PASSWORD}x` },
      { code: "000000" },
      { code: other.recovery_codes[0]! },
    ]) {
      await expect(stepUp({ ...factor, input })).rejects.toMatchObject({ code: "validation_failed" })
    }
  })

  it("is not had by a link", async () => {
    const person = await createPerson()
    const token = await linkTo(person.email)
    const opened = await signInByLink({ visitor: visitor(), input: { token } })
    const session = (await readSession(opened.token, new Date()))!
    expect(() => requireFresh(session, new Date())).toThrowError(
      expect.objectContaining({ code: "step_up_required" }),
    )
  })
})

describe("a person's sessions", () => {
  it("are listed with device and place, and end one by one or all others at once", async () => {
    const person = await createPerson()
    const [self, second, third] = [await signedIn(person), await signedIn(person), await signedIn(person)]
    const list = await listOwnSessions(self)
    expect(list).toHaveLength(3)
    expect(list.filter(({ is_this }) => is_this).map(({ id }) => id)).toEqual([self.session_id])
    expect(list[0]).toMatchObject({ user_agent: "test", ip: expect.stringMatching(/^2001:db8::/) })
    await endOwnSession({ ...self, input: { ended_id: second.session_id } })
    expect(await readSession(second.token, new Date())).toBeUndefined()
    await endOtherSessions(self)
    expect(await readSession(third.token, new Date())).toBeUndefined()
    expect(await readSession(self.token, new Date())).toBeDefined()
  })

  it("are not another's to end", async () => {
    const [self, other] = [await signedIn(await createPerson()), await signedIn(await createPerson())]
    await expect(endOwnSession({ ...self, input: { ended_id: other.session_id } })).rejects.toMatchObject({
      code: "not_found",
    })
    expect(await readSession(other.token, new Date())).toBeDefined()
  })

  it("end but for this one when the password changes, which takes the present one", async () => {
    const person = await createPerson()
    const [self, other] = [await signedIn(person), await signedIn(person)]
    const password = "lantern valve moss tarn"
    await expect(
      changePassword({ ...self, input: { present: "not this one at all", password } }),
    ).rejects.toMatchObject({ errors: [{ pointer: "/present" }] })
    await expect(
      changePassword({ ...self, input: { present: PASSWORD, password: "short" } }),
    ).rejects.toMatchObject({ errors: [{ pointer: "/password" }] })
    await changePassword({ ...self, input: { present: PASSWORD, password } })
    expect(await readSession(other.token, new Date())).toBeUndefined()
    expect(await readSession(self.token, new Date())).toBeDefined()
    expect(await signIn({ visitor: visitor(), input: { email: person.email, password } })).toBeDefined()
    await waitForMail(person.email, "was changed")
  })
})

describe("a link in place of the password", () => {
  it("signs in once, within half an hour, and is not used up by being looked at", async () => {
    const person = await createPerson()
    const token = await linkTo(person.email)
    const at = (shift_ms: number) => addressToSignIn({ visitor: visitor(shift_ms), input: { token } })
    expect(await at(29 * 60_000)).toBe(person.email)
    expect(await at(30 * 60_000 + 1000)).toBeUndefined()
    const opened = await signInByLink({ visitor: visitor(), input: { token } })
    expect(opened.person.id).toBe(person.id)
    await expect(signInByLink({ visitor: visitor(), input: { token } })).rejects.toMatchObject({
      code: "not_found",
    })
  })

  it("does not get around the second factor, and stays good until a code is right", async () => {
    const { secret, person } = await withSecondFactor()
    const token = await linkTo(person.email)
    const open = (code?: string) => signInByLink({ visitor: visitor(), input: { token, code } })
    await expect(open()).rejects.toMatchObject({ code: "second_factor_required" })
    await expect(open("000000")).rejects.toMatchObject({ code: "validation_failed" })
    expect((await open(codeOf(secret, 1))).person.id).toBe(person.id)
  })

  it("is sent to no unknown address, and nothing is said of it", async () => {
    const email = newAddress()
    expect(await requestSignInLink({ visitor: visitor(), input: { email } })).toBeUndefined()
    await new Promise((resolve) => setTimeout(resolve, 1_500))
    expect(await mailsTo(email)).toEqual([])
  })
})
