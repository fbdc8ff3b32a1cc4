import { withoutTenant } from "@/db"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { enqueueMail } from "@/lib/mail"
import { consumeToken, mintToken, peekToken } from "./one-time-token"
import { hashPassword } from "./password"
import { passwordProblem } from "./password-policy"
import { normaliseEmail, type Visit } from "./person"
import { recordOfPerson } from "./record-of-person"
import { endSessionsOf } from "./session"
import { forgetFailures, mayWriteTo } from "./throttle"

/** Sends a link to set a new password when the address is known; says nothing either way. */
export async function requestPasswordReset({
  visitor,
  input,
}: Visit<{ readonly email: string }>): Promise<void> {
  const email = normaliseEmail(input.email)
  if (!(await mayWriteTo(email, visitor))) return
  await withoutTenant(async (trx) => {
    const person = await trx
      .selectFrom("app_user")
      .select("name")
      .where("email", "=", email)
      .executeTakeFirst()
    if (!person) return
    const token = await mintToken(trx, { purpose: "reset_password", email, now: visitor.now })
    await enqueueMail(trx, {
      template: "reset_password",
      to: email,
      data: { name: person.name, url: `${env().PUBLIC_URL}/reset/set?token=${token}` },
    })
  })
}

/** The address whose password a link may set; undefined when the link is unknown, used or too old. */
export async function addressToReset({
  visitor,
  input,
}: Visit<{ token: string }>): Promise<string | undefined> {
  const found = await withoutTenant((trx) =>
    peekToken(trx, { purpose: "reset_password", token: input.token, now: visitor.now }),
  )
  return found?.email
}

/**
 * Sets a new password, ends every session of the person, and tells them by mail. Does not sign in.
 *
 * @throws TarnwrightError `validation_failed` when the password is too weak (the link stays good); `not_found` when
 * the link is unknown, used or too old.
 */
export async function resetPassword({
  visitor,
  input,
}: Visit<{ readonly token: string; readonly password: string }>): Promise<void> {
  const address = await addressToReset({ visitor, input })
  if (!address) throw deadLink()
  const problem = passwordProblem(input.password, { email: address })
  if (problem) {
    throw new TarnwrightError("validation_failed", problem, {
      errors: [{ pointer: "/password", detail: problem }],
    })
  }
  const password_hash = await hashPassword(input.password)
  const person = await withoutTenant(async (trx) => {
    const found = await consumeToken(trx, { purpose: "reset_password", token: input.token, now: visitor.now })
    if (!found) throw deadLink()
    const updated = await trx
      .updateTable("app_user")
      .set({ password_hash })
      .where("email", "=", found.email)
      .returning(["id", "name", "email"])
      .executeTakeFirst()
    if (!updated) throw deadLink()
    await endSessionsOf(trx, updated.id)
    await forgetFailures(trx, updated.email)
    await enqueueMail(trx, {
      template: "password_changed",
      to: updated.email,
      data: { name: updated.name, reset_url: `${env().PUBLIC_URL}/reset` },
    })
    return updated
  })
  await recordOfPerson(visitor, person.id, "person.password_reset")
}

function deadLink(): TarnwrightError {
  return new TarnwrightError("not_found", "This link was used before or is too old. Ask for a new one.")
}
