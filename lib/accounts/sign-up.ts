import { withoutTenant } from "@/db"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { enqueueMail } from "@/lib/mail"
import { mintToken } from "./one-time-token"
import { hashPassword } from "./password"
import { passwordProblem } from "./password-policy"
import { normaliseEmail, type Visit } from "./person"
import { mayWriteTo } from "./throttle"

export interface NewPerson {
  readonly name: string
  readonly email: string
  readonly organisation: string
  readonly password: string
}

/** What waits in a verification token until its address is confirmed. */
export interface Pending {
  readonly name: string
  readonly organisation: string
  readonly password_hash: string
}

/**
 * Takes a sign-up and sends the letter that confirms its address. Nothing but the token is stored until then, so that
 * nobody can occupy an address that is not theirs, and the answer is the same whether the address is known or not.
 *
 * @throws TarnwrightError `validation_failed` when the password is too weak.
 */
export async function signUp({ visitor, input }: Visit<NewPerson>): Promise<void> {
  const email = normaliseEmail(input.email)
  const problem = passwordProblem(input.password, { email, name: input.name })
  if (problem) {
    throw new TarnwrightError("validation_failed", problem, {
      errors: [{ pointer: "/password", detail: problem }],
    })
  }
  const pending: Pending = {
    name: input.name,
    organisation: input.organisation,
    password_hash: await hashPassword(input.password),
  }
  if (!(await mayWriteTo(email, visitor))) return
  await withoutTenant(async (trx) => {
    const known = await trx
      .selectFrom("app_user")
      .select("name")
      .where("email", "=", email)
      .executeTakeFirst()
    if (known) {
      const data = { name: known.name, sign_in_url: `${env().PUBLIC_URL}/signin` }
      await enqueueMail(trx, { template: "already_signed_up", to: email, data })
      return
    }
    const payload = { ...pending }
    const token = await mintToken(trx, { purpose: "verify_email", email, payload, now: visitor.now })
    const data = { name: input.name, url: `${env().PUBLIC_URL}/verify?token=${token}` }
    await enqueueMail(trx, { template: "verify_email", to: email, data })
  })
}
