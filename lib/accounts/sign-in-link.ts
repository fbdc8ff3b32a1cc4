import { withoutTenant } from "@/db"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { enqueueMail } from "@/lib/mail"
import { consumeToken, mintToken, peekToken } from "./one-time-token"
import { normaliseEmail, type Visit } from "./person"
import { requireSecondFactor } from "./second-factor"
import { type OpenedSession, openSession } from "./session"
import { admitTry, forgetFailures, mayWriteTo } from "./throttle"

/** Sends a link that signs in, in place of a password, when the address is known; says nothing either way. */
export async function requestSignInLink({
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
    const token = await mintToken(trx, { purpose: "sign_in", email, now: visitor.now })
    await enqueueMail(trx, {
      template: "sign_in_link",
      to: email,
      data: { name: person.name, url: `${env().PUBLIC_URL}/signin/link/open?token=${token}` },
    })
  })
}

/** The address that a link signs in; undefined when the link is unknown, used or too old. */
export async function addressToSignIn({
  visitor,
  input,
}: Visit<{ readonly token: string }>): Promise<string | undefined> {
  const found = await withoutTenant((trx) =>
    peekToken(trx, { purpose: "sign_in", token: input.token, now: visitor.now }),
  )
  return found?.email
}

/**
 * Opens a session for whoever holds a link and, where the person set one up, a code of their second factor. Without
 * a right code the link stays good.
 *
 * @throws TarnwrightError `not_found` when the link is unknown, used or too old; `second_factor_required` when a code
 * is missing; `validation_failed` when it is wrong; `rate_limited` after too many wrong ones.
 */
export async function signInByLink({
  visitor,
  input,
}: Visit<{ readonly token: string; readonly code?: string }>): Promise<OpenedSession> {
  const email = await addressToSignIn({ visitor, input })
  if (!email) throw deadLink()
  if (input.code) await withoutTenant((trx) => admitTry(trx, visitor, email))
  return withoutTenant(async (trx) => {
    const found = await consumeToken(trx, { purpose: "sign_in", token: input.token, now: visitor.now })
    if (!found) throw deadLink()
    const person = await trx
      .selectFrom("app_user")
      .select(["id", "email", "name", "is_admin"])
      .where("email", "=", found.email)
      .executeTakeFirst()
    if (!person) throw deadLink()
    const showedCode = await requireSecondFactor(trx, visitor, person, input.code)
    await forgetFailures(trx, person.email)
    return openSession(trx, visitor, person, { fresh: showedCode })
  })
}

function deadLink(): TarnwrightError {
  return new TarnwrightError("not_found", "This link was used before or is too old. Ask for a new one.")
}
