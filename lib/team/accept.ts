import { type Role, type Trx, withTenant } from "@/db"
import {
  hashPassword,
  type OpenedSession,
  openSession,
  type Person,
  passwordProblem,
  type Visit,
  type Visitor,
} from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { lockTeam } from "./lock"
import { countPlaces, refuseWhenFull } from "./places"
import { accountOf, digestOf } from "./token"

/** What an invitation says to whoever opens its link. */
export interface OpenInvitation {
  readonly account_name: string
  readonly slug: string
  readonly email: string
  readonly role: Role
  readonly invited_by: string
  /** Whether the address has a sign-in; otherwise the invitation itself makes one. */
  readonly has_sign_in: boolean
}

/** The invitation behind a link; undefined when it is unknown, used, taken back or too old. */
export async function readInvitation({
  visitor,
  input,
}: Visit<{ readonly token: string }>): Promise<OpenInvitation | undefined> {
  const account_id = accountOf(input.token)
  if (!account_id) return undefined
  return withTenant(account_id, (trx) =>
    trx
      .selectFrom("invitation")
      .innerJoin("account", "account.id", "invitation.account_id")
      .leftJoin("app_user", "app_user.email", "invitation.email")
      .select((select) => [
        "account.name as account_name",
        "account.slug",
        "invitation.email",
        "invitation.role",
        "invitation.invited_by",
        select("app_user.id", "is not", null).$castTo<boolean>().as("has_sign_in"),
      ])
      .where("invitation.token_digest", "=", digestOf(input.token))
      .where("invitation.expires_at", ">", visitor.now)
      .executeTakeFirst(),
  )
}

/**
 * Lets a person into the account that invited them, when they are signed in as the address that was written to.
 *
 * @returns the slug of the account
 * @throws TarnwrightError `not_found` when the link is no longer good; `forbidden` when another address was invited;
 * `plan_limit_reached` when the places were filled in the meantime.
 */
export async function acceptInvitation({
  visitor,
  person,
  input,
}: Visit<{ readonly token: string }> & { readonly person: Person }): Promise<{ slug: string }> {
  const account_id = accountOf(input.token)
  if (!account_id) throw deadLink()
  return withTenant(account_id, async (trx) => {
    const { slug } = await join(trx, visitor, { account_id, token: input.token }, async (email) => {
      if (email !== person.email) {
        throw new TarnwrightError(
          "forbidden",
          `This invitation is for ${email}, and you are signed in as ${person.email}. Sign in as ${email}.`,
        )
      }
      return person
    })
    return { slug }
  })
}

/**
 * Makes a sign-in for an address that was invited and has none, lets it into the account and opens a session: the
 * link has proved the address.
 *
 * @throws TarnwrightError `validation_failed` when the password is too weak (the link stays good); `conflict` when the
 * address has a sign-in; otherwise as {@link acceptInvitation}.
 */
export async function signUpByInvitation({
  visitor,
  input,
}: Visit<{
  readonly token: string
  readonly name: string
  readonly password: string
}>): Promise<OpenedSession> {
  const invitation = await readInvitation({ visitor, input })
  const account_id = accountOf(input.token)
  if (!invitation || !account_id) throw deadLink()
  const problem = passwordProblem(input.password, { email: invitation.email, name: input.name })
  if (problem) {
    throw new TarnwrightError("validation_failed", problem, {
      errors: [{ pointer: "/password", detail: problem }],
    })
  }
  const password_hash = await hashPassword(input.password)
  return withTenant(account_id, async (trx) => {
    const { person } = await join(trx, visitor, { account_id, token: input.token }, async (email) => {
      const made: Person = { id: newId("user"), email, name: input.name, is_admin: false }
      const inserted = await trx
        .insertInto("app_user")
        .values({
          id: made.id,
          email,
          name: made.name,
          password_hash,
          email_verified_at: visitor.now,
          created_at: visitor.now,
        })
        .onConflict((conflict) => conflict.column("email").doNothing())
        .executeTakeFirst()
      if (inserted.numInsertedOrUpdatedRows === 1n) return made
      throw new TarnwrightError("conflict", "This address has a sign-in already. Sign in, then accept.")
    })
    // Who waits to confirm the same address by an ordinary sign-up has confirmed it now.
    await trx
      .updateTable("one_time_token")
      .set({ used_at: visitor.now })
      .where("email", "=", person.email)
      .where("purpose", "=", "verify_email")
      .where("used_at", "is", null)
      .execute()
    return openSession(trx, visitor, person)
  })
}

/** Uses an invitation up for the person whom `whoIs` its address. */
async function join(
  trx: Trx,
  visitor: Visitor,
  { account_id, token }: { account_id: string; token: string },
  whoIs: (email: string) => Promise<Person>,
): Promise<{ person: Person; slug: string }> {
  const { plan } = await lockTeam(trx, { account_id })
  const invitation = await trx
    .deleteFrom("invitation")
    .where("token_digest", "=", digestOf(token))
    .where("expires_at", ">", visitor.now)
    .returning(["id", "email", "role"])
    .executeTakeFirst()
  if (!invitation) throw deadLink()
  const person = await whoIs(invitation.email)
  refuseWhenFull(plan, (await countPlaces(trx, account_id, visitor.now)).members)
  const { id, role } = invitation
  await trx
    .insertInto("membership")
    .values({ account_id, user_id: person.id, role, created_at: visitor.now })
    .execute()
  await recordAct(
    trx,
    {
      account_id,
      actor: { kind: "user", id: person.id, role },
      ip: visitor.ip,
      request_id: visitor.request_id,
      now: visitor.now,
    },
    { action: "team.joined", target: id, detail: { email: person.email, role } },
  )
  const { slug } = await trx
    .selectFrom("account")
    .select("slug")
    .where("id", "=", account_id)
    .executeTakeFirstOrThrow()
  return { person, slug }
}

function deadLink(): TarnwrightError {
  return new TarnwrightError(
    "not_found",
    "This invitation was used, taken back or is older than 72 hours. Ask for a new one.",
  )
}
