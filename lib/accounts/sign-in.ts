import { type Trx, withoutTenant } from "@/db"
import { TarnwrightError } from "@/lib/errors"
import { hashPassword, isOutdated, isPasswordOf } from "./password"
import { normaliseEmail, type Visit } from "./person"
import { requireSecondFactor } from "./second-factor"
import { type OpenedSession, openSession } from "./session"
import type { Pending } from "./sign-up"
import { admitTry, forgetFailures } from "./throttle"

/**
 * Opens a session for an address, its password and, where the person set one up, a code of their second factor; a
 * password alone is then worth nothing. The try stays counted until a code is right. Undefined when address and password
 * do not belong together, in the same time and with the same answer whether the address is known or not.
 *
 * @throws TarnwrightError `rate_limited` after too many failures; `conflict` when the pair is right but the address
 * was not confirmed yet; `second_factor_required` when it is right and a code is missing; `validation_failed` when
 * the code is wrong.
 */
export async function signIn({
  visitor,
  input,
}: Visit<{ readonly email: string; readonly password: string; readonly code?: string }>): Promise<
  OpenedSession | undefined
> {
  const email = normaliseEmail(input.email)
  const { person, password_hash, waiting } = await withoutTenant(async (trx) => {
    await admitTry(trx, visitor, email)
    return findByAddress(trx, email, visitor.now)
  })
  if (!(await isPasswordOf(password_hash, input.password))) return undefined
  if (waiting || !person) {
    throw new TarnwrightError(
      "conflict",
      "Confirm your e-mail address first: open the link that we sent you.",
    )
  }
  const renewed = isOutdated(password_hash!) ? await hashPassword(input.password) : undefined
  return withoutTenant(async (trx) => {
    await requireSecondFactor(trx, visitor, person, input.code)
    await forgetFailures(trx, email)
    if (renewed) {
      await trx.updateTable("app_user").set({ password_hash: renewed }).where("id", "=", person.id).execute()
    }
    return openSession(trx, visitor, person)
  })
}

async function findByAddress(trx: Trx, email: string, now: Date) {
  const found = await trx
    .selectFrom("app_user")
    .select(["id", "email", "name", "is_admin", "password_hash"])
    .where("email", "=", email)
    .executeTakeFirst()
  if (found) {
    const { password_hash, ...person } = found
    return { person, password_hash, waiting: false }
  }
  const pending = await trx
    .selectFrom("one_time_token")
    .select("payload")
    .where("email", "=", email)
    .where("purpose", "=", "verify_email")
    .where("used_at", "is", null)
    .where("expires_at", ">", now)
    .executeTakeFirst()
  const password_hash = (pending?.payload as unknown as Pending | undefined)?.password_hash
  return { person: undefined, password_hash, waiting: true }
}
