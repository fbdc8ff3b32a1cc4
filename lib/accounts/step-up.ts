import { withoutTenant } from "@/db"
import { TarnwrightError } from "@/lib/errors"
import { isPasswordOf } from "./password"
import { acceptCode, type Self } from "./second-factor"
import type { ReadSession } from "./session"
import { admitTry, forgetFailures } from "./throttle"

// @source PLATFORM 5.8
const freshFor_ms = 10 * 60_000

/** @throws TarnwrightError `step_up_required` when no password or code was shown in this session in ten minutes. */
export function requireFresh(session: Pick<ReadSession, "stepped_up_at">, now: Date): void {
  const since = session.stepped_up_at
  if (since && now.getTime() - since.getTime() <= freshFor_ms) return
  throw new TarnwrightError("step_up_required", "Confirm first that it is you, by your password or a code.")
}

/**
 * Confirms that it is still the same person who sits before this session, by their password or by a code.
 *
 * @throws TarnwrightError `validation_failed` when it is wrong; `rate_limited` after too many failures.
 */
export async function stepUp({
  visitor,
  person,
  session_id,
  input,
}: Self<{ readonly password: string } | { readonly code: string }>): Promise<void> {
  const stored = await withoutTenant(async (trx) => {
    await admitTry(trx, visitor, person.email)
    return trx
      .selectFrom("app_user")
      .select("password_hash")
      .where("id", "=", person.id)
      .executeTakeFirstOrThrow()
  })
  const byPassword = "password" in input && (await isPasswordOf(stored.password_hash, input.password))
  await withoutTenant(async (trx) => {
    if (!byPassword && !("code" in input && (await acceptCode(trx, visitor, person, input.code)))) {
      const [pointer, detail] =
        "code" in input
          ? ["/code", "This code is wrong, too old, or was used before. Wait for the next one."]
          : ["/password", "This is not your password."]
      throw new TarnwrightError("validation_failed", detail, { errors: [{ pointer, detail }] })
    }
    await forgetFailures(trx, person.email)
    await trx
      .updateTable("session")
      .set({ stepped_up_at: visitor.now })
      .where("id", "=", session_id)
      .execute()
  })
}
