import { type Role, type Trx, withTenant } from "@/db"
import { authorize, normaliseEmail } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { enqueueMail } from "@/lib/mail"
import { rateLimiter } from "@/lib/usage"
import { lockTeam } from "./lock"
import { countPlaces, refuseWhenFull } from "./places"
import { digestOf, newToken } from "./token"

// @source PLATFORM 5.9
const validFor_ms = 72 * 3_600_000

// An owner must not be able to fill a stranger's mailbox through us.
const lettersTo = { points: 5, window_s: 3600 }

/**
 * Invites an address into the account and writes to it. Who may invite is an owner, so no role is above their own.
 *
 * @throws TarnwrightError `conflict` when the address belongs to the account or is invited already;
 * `plan_limit_reached` when the plan has no place left.
 */
export async function invite({
  ctx,
  input,
}: Call<{ readonly email: string; readonly role: Role }>): Promise<{ id: string }> {
  authorize(ctx.actor, "team.manage")
  const email = normaliseEmail(input.email)
  await refuseFlood(email)
  return withTenant(ctx.account_id, async (trx) => {
    const { name, plan } = await lockTeam(trx, ctx)
    await refuseKnown(trx, ctx, email)
    const { members, invited } = await countPlaces(trx, ctx.account_id, ctx.now)
    refuseWhenFull(plan, members + invited)
    const id = newId("invitation")
    const token = newToken(ctx.account_id)
    await trx
      .insertInto("invitation")
      .values({
        account_id: ctx.account_id,
        id,
        email,
        role: input.role,
        token_digest: digestOf(token),
        invited_by: await nameOf(trx, ctx),
        created_at: ctx.now,
        expires_at: new Date(ctx.now.getTime() + validFor_ms),
      })
      .execute()
    await write(trx, ctx, { account_name: name, email, role: input.role, token })
    await recordAct(trx, ctx, { action: "team.invited", target: id, detail: { email, role: input.role } })
    return { id }
  })
}

/**
 * Sends an invitation again, with a new link that works 72 hours; the old one stops.
 *
 * @throws TarnwrightError `not_found` when it was accepted or taken back.
 */
export async function resendInvitation({
  ctx,
  input,
}: Call<{ readonly invitation_id: string }>): Promise<void> {
  authorize(ctx.actor, "team.manage")
  await withTenant(ctx.account_id, async (trx) => {
    const { name, plan } = await lockTeam(trx, ctx)
    const found = await trx
      .selectFrom("invitation")
      .select(["email", "role", "expires_at"])
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", input.invitation_id)
      .executeTakeFirst()
    if (!found) throw noInvitation()
    await refuseFlood(found.email)
    const { members, invited } = await countPlaces(trx, ctx.account_id, ctx.now)
    const holdsPlace = found.expires_at > ctx.now ? 1 : 0
    refuseWhenFull(plan, members + invited - holdsPlace)
    const token = newToken(ctx.account_id)
    await trx
      .updateTable("invitation")
      .set({ token_digest: digestOf(token), expires_at: new Date(ctx.now.getTime() + validFor_ms) })
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", input.invitation_id)
      .execute()
    await write(trx, ctx, { account_name: name, email: found.email, role: found.role, token })
    await recordAct(trx, ctx, {
      action: "team.invitation_resent",
      target: input.invitation_id,
      detail: { email: found.email, role: found.role },
    })
  })
}

/**
 * Takes an invitation back: its link is worth nothing from now on.
 *
 * @throws TarnwrightError `not_found` when it was accepted or taken back.
 */
export async function revokeInvitation({
  ctx,
  input,
}: Call<{ readonly invitation_id: string }>): Promise<void> {
  authorize(ctx.actor, "team.manage")
  await withTenant(ctx.account_id, async (trx) => {
    const deleted = await trx
      .deleteFrom("invitation")
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", input.invitation_id)
      .returning(["email", "role"])
      .executeTakeFirst()
    if (!deleted) throw noInvitation()
    await recordAct(trx, ctx, {
      action: "team.invitation_revoked",
      target: input.invitation_id,
      detail: deleted,
    })
  })
}

async function refuseKnown(trx: Trx, ctx: Ctx, email: string): Promise<void> {
  const member = await trx
    .selectFrom("membership")
    .innerJoin("app_user", "app_user.id", "membership.user_id")
    .select("app_user.name")
    .where("membership.account_id", "=", ctx.account_id)
    .where("app_user.email", "=", email)
    .executeTakeFirst()
  if (member) throw atAddress(`${member.name} belongs to this account already.`)
  const invited = await trx
    .selectFrom("invitation")
    .select("id")
    .where("account_id", "=", ctx.account_id)
    .where("email", "=", email)
    .executeTakeFirst()
  if (invited) throw atAddress("This address is invited already. Send its invitation again instead.")
}

async function refuseFlood(email: string): Promise<void> {
  if ((await rateLimiter().take(`invitation-to:${email}`, lettersTo)).allowed) return
  throw new TarnwrightError(
    "rate_limited",
    "This address was written to several times. Try again in an hour.",
  )
}

async function write(
  trx: Trx,
  ctx: Ctx,
  letter: { account_name: string; email: string; role: Role; token: string },
): Promise<void> {
  await enqueueMail(trx, {
    template: "invitation",
    to: letter.email,
    data: {
      inviter_name: await nameOf(trx, ctx),
      account_name: letter.account_name,
      role: letter.role,
      url: `${env().PUBLIC_URL}/invite/${letter.token}`,
    },
  })
}

async function nameOf(trx: Trx, ctx: Ctx): Promise<string> {
  const person = await trx
    .selectFrom("app_user")
    .select("name")
    .where("id", "=", ctx.actor.id)
    .executeTakeFirst()
  return person?.name ?? "Tarnwright"
}

function atAddress(detail: string): TarnwrightError {
  return new TarnwrightError("conflict", detail, { errors: [{ pointer: "/email", detail }] })
}

function noInvitation(): TarnwrightError {
  return new TarnwrightError("not_found", "This invitation was accepted or taken back in the meantime.")
}
