import { type Trx, withoutTenant } from "@/db"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { enqueueMail } from "@/lib/mail"
import { seal, unseal } from "@/lib/seal"
import type { Person, Visitor } from "./person"
import { recordOfPerson } from "./record-of-person"
import { digestOfRecoveryCode, newRecoveryCodes } from "./recovery-codes"
import { endSessionsOf } from "./session"
import { admitTry, forgetFailures } from "./throttle"
import { newSeed, stepOf, totpUri } from "./totp"

/** A person who acts on their own sign-in, in a session of theirs. */
export interface Self<Input = undefined> {
  readonly visitor: Visitor
  readonly person: Person
  readonly session_id: string
  readonly input: Input
}

/** How a person's second factor stands. */
export interface SecondFactorState {
  /** Null: none is set up. */
  readonly since: Date | null
  readonly recovery_codes_left: number
}

export function describeSecondFactor({ user_id }: { user_id: string }): Promise<SecondFactorState> {
  return withoutTenant(async (trx) => {
    const found = await trx
      .selectFrom("second_factor")
      .select("confirmed_at")
      .where("user_id", "=", user_id)
      .executeTakeFirst()
    return { since: found?.confirmed_at ?? null, recovery_codes_left: await codesLeft(trx, user_id) }
  })
}

/**
 * Begins to set a second factor up: a seed for an authenticator app, worth nothing until a code of it was shown.
 *
 * @throws TarnwrightError `conflict` when one is set up already.
 */
export function beginSecondFactor({
  visitor,
  person,
}: Omit<Self, "input">): Promise<{ secret: string; uri: string }> {
  return withoutTenant(async (trx) => {
    const secret = newSeed()
    const seed = seal(secret, placeOf(person.id))
    const written = await trx
      .insertInto("second_factor")
      .values({ user_id: person.id, seed, created_at: visitor.now, confirmed_at: null })
      .onConflict((conflict) =>
        conflict
          .column("user_id")
          .doUpdateSet({ seed, last_step: 0 })
          .where("second_factor.confirmed_at", "is", null),
      )
      .executeTakeFirst()
    if (written.numInsertedOrUpdatedRows !== 1n) {
      throw new TarnwrightError("conflict", "A second factor is set up already. Remove it first.")
    }
    return { secret, uri: totpUri(secret, person.email) }
  })
}

/**
 * Ends setting up: a first code shows that the app holds the seed. Every other session ends, and the person is told.
 *
 * @returns the recovery codes, this once
 * @throws TarnwrightError `validation_failed` when the code is wrong.
 */
export async function confirmSecondFactor({
  visitor,
  person,
  session_id,
  input,
}: Self<{ readonly code: string }>): Promise<{ recovery_codes: string[] }> {
  await withoutTenant((trx) => admitTry(trx, visitor, person.email))
  const recovery_codes = await withoutTenant(async (trx) => {
    if (!(await acceptTotp(trx, person.id, input.code, visitor.now, { confirmed: false }))) throw wrongCode()
    await trx
      .updateTable("second_factor")
      .set({ confirmed_at: visitor.now })
      .where("user_id", "=", person.id)
      .execute()
    await forgetFailures(trx, person.email)
    await endSessionsOf(trx, person.id, { session_id })
    await tell(trx, person, "set_up")
    return replaceRecoveryCodes(trx, person.id)
  })
  await recordOfPerson(visitor, person.id, "person.second_factor_set_up")
  return { recovery_codes }
}

/**
 * Removes the second factor and its recovery codes. Every other session ends, and the person is told.
 *
 * @throws TarnwrightError `forbidden` for the platform's admins, who may not be without one.
 */
export async function removeSecondFactor({
  visitor,
  person,
  session_id,
}: Omit<Self, "input">): Promise<void> {
  if (person.is_admin) {
    throw new TarnwrightError("forbidden", "The platform's admins cannot be without a second factor.")
  }
  await withoutTenant(async (trx) => {
    await trx.deleteFrom("second_factor").where("user_id", "=", person.id).execute()
    await trx.deleteFrom("recovery_code").where("user_id", "=", person.id).execute()
    await endSessionsOf(trx, person.id, { session_id })
    await tell(trx, person, "removed")
  })
  await recordOfPerson(visitor, person.id, "person.second_factor_removed")
}

/**
 * Makes ten new recovery codes; the old ones are void.
 *
 * @throws TarnwrightError `conflict` when no second factor is set up.
 */
export async function renewRecoveryCodes({
  visitor,
  person,
}: Omit<Self, "input">): Promise<{ recovery_codes: string[] }> {
  const recovery_codes = await withoutTenant(async (trx) => {
    if (!(await isSetUp(trx, person.id)))
      throw new TarnwrightError("conflict", "Set a second factor up first.")
    await tell(trx, person, "codes_renewed")
    return replaceRecoveryCodes(trx, person.id)
  })
  await recordOfPerson(visitor, person.id, "person.recovery_codes_renewed")
  return { recovery_codes }
}

/**
 * Lets whoever has no second factor pass, and whoever has one with a right code, which is used up.
 *
 * @returns whether a code was shown
 * @throws TarnwrightError `second_factor_required` without a code; `validation_failed` with a wrong one.
 */
export async function requireSecondFactor(
  trx: Trx,
  visitor: Visitor,
  person: Person,
  code: string | undefined,
): Promise<boolean> {
  if (!(await isSetUp(trx, person.id))) return false
  if (!code) throw new TarnwrightError("second_factor_required", "Write the code of your authenticator app.")
  if (!(await acceptCode(trx, visitor, person, code))) throw wrongCode()
  return true
}

/** Whether this is a code of the person's app or one of their recovery codes that was not used; now it is. */
export async function acceptCode(trx: Trx, visitor: Visitor, person: Person, code: string): Promise<boolean> {
  if (await acceptTotp(trx, person.id, code, visitor.now, { confirmed: true })) return true
  const digest = digestOfRecoveryCode(code)
  if (!digest) return false
  const used = await trx
    .updateTable("recovery_code")
    .set({ used_at: visitor.now })
    .where("user_id", "=", person.id)
    .where("digest", "=", digest)
    .where("used_at", "is", null)
    .executeTakeFirst()
  if (used.numUpdatedRows !== 1n) return false
  await tell(trx, person, "recovery_code_used")
  return true
}

/** Accepts a code of a time step after the last accepted one: the same code never counts twice. */
async function acceptTotp(
  trx: Trx,
  user_id: string,
  typed: string,
  now: Date,
  { confirmed }: { confirmed: boolean },
): Promise<boolean> {
  const code = typed.replace(/\s/g, "")
  if (!/^\d{6}$/.test(code)) return false
  const found = await trx
    .selectFrom("second_factor")
    .select(["seed"])
    .where("user_id", "=", user_id)
    .where("confirmed_at", confirmed ? "is not" : "is", null)
    .executeTakeFirst()
  const step = found && stepOf(unseal(found.seed, placeOf(user_id)), code, now)
  if (step === undefined) return false
  const { numUpdatedRows } = await trx
    .updateTable("second_factor")
    .set({ last_step: step })
    .where("user_id", "=", user_id)
    .where("last_step", "<", step)
    .executeTakeFirst()
  return numUpdatedRows === 1n
}

async function isSetUp(trx: Trx, user_id: string): Promise<boolean> {
  const found = await trx
    .selectFrom("second_factor")
    .select("user_id")
    .where("user_id", "=", user_id)
    .where("confirmed_at", "is not", null)
    .executeTakeFirst()
  return found !== undefined
}

async function replaceRecoveryCodes(trx: Trx, user_id: string): Promise<string[]> {
  const codes = newRecoveryCodes()
  await trx.deleteFrom("recovery_code").where("user_id", "=", user_id).execute()
  await trx
    .insertInto("recovery_code")
    .values(codes.map((code) => ({ user_id, digest: digestOfRecoveryCode(code)!, used_at: null })))
    .execute()
  return codes
}

async function codesLeft(trx: Trx, user_id: string): Promise<number> {
  const { count } = await trx
    .selectFrom("recovery_code")
    .select((select) => select.fn.countAll<number>().as("count"))
    .where("user_id", "=", user_id)
    .where("used_at", "is", null)
    .executeTakeFirstOrThrow()
  return count
}

async function tell(
  trx: Trx,
  { id, name, email }: Person,
  what: "set_up" | "removed" | "codes_renewed" | "recovery_code_used",
): Promise<void> {
  const codes_left = await codesLeft(trx, id)
  const data = { name, what, codes_left, reset_url: `${env().PUBLIC_URL}/reset` }
  await enqueueMail(trx, { template: "second_factor_changed", to: email, data })
}

function placeOf(user_id: string): string {
  return `second_factor:${user_id}`
}

function wrongCode(): TarnwrightError {
  const detail = "This code is wrong, too old, or was used before. Wait for the next one."
  return new TarnwrightError("validation_failed", detail, { errors: [{ pointer: "/code", detail }] })
}
