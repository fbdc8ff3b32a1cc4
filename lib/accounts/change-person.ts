import { withoutTenant } from "@/db"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { enqueueMail } from "@/lib/mail"
import { hashPassword, isPasswordOf } from "./password"
import { passwordProblem } from "./password-policy"
import { recordOfPerson } from "./record-of-person"
import type { Self } from "./second-factor"
import { endSessionsOf } from "./session"
import { admitTry, forgetFailures } from "./throttle"

/** Gives a person another name. */
export async function renamePerson({ person, input }: Self<{ readonly name: string }>): Promise<void> {
  await withoutTenant((trx) =>
    trx.updateTable("app_user").set({ name: input.name }).where("id", "=", person.id).execute(),
  )
}

/**
 * Sets another password, for whoever knows the one that holds. Every other session ends, and the person is told.
 *
 * @throws TarnwrightError `validation_failed` when the present password is wrong or the new one too weak;
 * `rate_limited` after too many failures.
 */
export async function changePassword({
  visitor,
  person,
  session_id,
  input,
}: Self<{ readonly present: string; readonly password: string }>): Promise<void> {
  const problem = passwordProblem(input.password, person)
  if (problem) throw atField("/password", problem)
  const stored = await withoutTenant(async (trx) => {
    await admitTry(trx, visitor, person.email)
    return trx
      .selectFrom("app_user")
      .select("password_hash")
      .where("id", "=", person.id)
      .executeTakeFirstOrThrow()
  })
  if (!(await isPasswordOf(stored.password_hash, input.present))) {
    throw atField("/present", "This is not your password.")
  }
  const password_hash = await hashPassword(input.password)
  await withoutTenant(async (trx) => {
    await trx.updateTable("app_user").set({ password_hash }).where("id", "=", person.id).execute()
    await forgetFailures(trx, person.email)
    await endSessionsOf(trx, person.id, { session_id })
    await enqueueMail(trx, {
      template: "password_changed",
      to: person.email,
      data: { name: person.name, reset_url: `${env().PUBLIC_URL}/reset` },
    })
  })
  await recordOfPerson(visitor, person.id, "person.password_changed")
}

function atField(pointer: string, detail: string): TarnwrightError {
  return new TarnwrightError("validation_failed", detail, { errors: [{ pointer, detail }] })
}
