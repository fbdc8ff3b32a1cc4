import { withoutTenant, withTenant } from "@/db"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { consumeToken, peekToken } from "./one-time-token"
import { openAccount } from "./open-account"
import type { Person, Visit } from "./person"
import { type OpenedSession, openSession } from "./session"
import type { Pending } from "./sign-up"

/** The address that a verification link confirms; undefined when the link is unknown, used or too old. */
export async function addressToVerify({
  visitor,
  input,
}: Visit<{ token: string }>): Promise<string | undefined> {
  const found = await withoutTenant((trx) =>
    peekToken(trx, { purpose: "verify_email", token: input.token, now: visitor.now }),
  )
  return found?.email
}

/**
 * Confirms an address: makes the person, their account and a session for them, all or nothing.
 *
 * @throws TarnwrightError `not_found` when the link is unknown, used or too old; `conflict` when the address was
 * confirmed by another link in the meantime.
 */
export function verifyEmail({ visitor, input }: Visit<{ token: string }>): Promise<OpenedSession> {
  const account_id = newId("account")
  return withTenant(account_id, async (trx) => {
    const found = await consumeToken(trx, { purpose: "verify_email", token: input.token, now: visitor.now })
    if (!found) {
      throw new TarnwrightError(
        "not_found",
        "This link was used before or is too old. Sign up again to get a new one.",
      )
    }
    const pending = found.payload as unknown as Pending
    const person: Person = { id: newId("user"), email: found.email, name: pending.name, is_admin: false }
    const inserted = await trx
      .insertInto("app_user")
      .values({
        id: person.id,
        email: person.email,
        name: person.name,
        password_hash: pending.password_hash,
        email_verified_at: visitor.now,
        created_at: visitor.now,
      })
      .onConflict((conflict) => conflict.column("email").doNothing())
      .executeTakeFirst()
    if (inserted.numInsertedOrUpdatedRows !== 1n) {
      throw new TarnwrightError("conflict", "This address is confirmed already. Sign in.")
    }
    await openAccount(trx, visitor, { account_id, user_id: person.id, organisation: pending.organisation })
    return openSession(trx, visitor, person)
  })
}
