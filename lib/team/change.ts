import { type Role, type Trx, withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { enqueueMail } from "@/lib/mail"
import { lockTeam } from "./lock"

/**
 * Gives a member another role and tells them.
 *
 * @throws TarnwrightError `not_found` when they do not belong to the account; `conflict` when they are its last owner.
 */
export async function changeRole({
  ctx,
  input,
}: Call<{ readonly user_id: string; readonly role: Role }>): Promise<void> {
  authorize(ctx.actor, "team.manage")
  await withTenant(ctx.account_id, async (trx) => {
    const { name } = await lockTeam(trx, ctx)
    const member = await memberOf(trx, ctx, input.user_id)
    if (member.role === input.role) return
    if (member.role === "owner") await refuseLastOwner(trx, ctx, "Make someone else owner first.")
    await trx
      .updateTable("membership")
      .set({ role: input.role })
      .where("account_id", "=", ctx.account_id)
      .where("user_id", "=", input.user_id)
      .execute()
    await recordAct(trx, ctx, {
      action: "team.role_changed",
      target: input.user_id,
      detail: { email: member.email, from: member.role, to: input.role },
    })
    await enqueueMail(trx, {
      template: "membership_changed",
      to: member.email,
      data: { name: member.name, account_name: name, role: input.role },
    })
  })
}

/**
 * Takes a member out of the account, from one moment to the next, and tells them. What they made stays.
 *
 * @throws TarnwrightError `not_found` when they do not belong to the account; `conflict` when they are its last owner.
 */
export async function removeMember({ ctx, input }: Call<{ readonly user_id: string }>): Promise<void> {
  authorize(ctx.actor, "team.manage")
  await withTenant(ctx.account_id, async (trx) => {
    const { name } = await lockTeam(trx, ctx)
    const member = await takeOut(trx, ctx, input.user_id)
    await recordAct(trx, ctx, {
      action: "team.removed",
      target: input.user_id,
      detail: { email: member.email, role: member.role },
    })
    await enqueueMail(trx, {
      template: "membership_changed",
      to: member.email,
      data: { name: member.name, account_name: name, role: null },
    })
  })
}

/** Lets whoever asks out of the account. @throws TarnwrightError `conflict` when they are its last owner. */
export async function leaveAccount({ ctx }: { ctx: Ctx }): Promise<void> {
  await withTenant(ctx.account_id, async (trx) => {
    await lockTeam(trx, ctx)
    const member = await takeOut(trx, ctx, ctx.actor.id)
    await recordAct(trx, ctx, {
      action: "team.left",
      target: ctx.actor.id,
      detail: { email: member.email, role: member.role },
    })
  })
}

async function takeOut(trx: Trx, ctx: Ctx, user_id: string) {
  const member = await memberOf(trx, ctx, user_id)
  if (member.role === "owner") {
    await refuseLastOwner(trx, ctx, "Make someone else owner first, or delete the account under Settings.")
  }
  await trx
    .deleteFrom("membership")
    .where("account_id", "=", ctx.account_id)
    .where("user_id", "=", user_id)
    .execute()
  return member
}

async function memberOf(trx: Trx, ctx: Ctx, user_id: string) {
  const member = await trx
    .selectFrom("membership")
    .innerJoin("app_user", "app_user.id", "membership.user_id")
    .select(["membership.role", "app_user.name", "app_user.email"])
    .where("membership.account_id", "=", ctx.account_id)
    .where("membership.user_id", "=", user_id)
    .executeTakeFirst()
  if (!member) throw new TarnwrightError("not_found", "This person does not belong to the account.")
  return member
}

async function refuseLastOwner(trx: Trx, ctx: Ctx, instead: string): Promise<void> {
  const { count } = await trx
    .selectFrom("membership")
    .select((select) => select.fn.countAll<number>().as("count"))
    .where("account_id", "=", ctx.account_id)
    .where("role", "=", "owner")
    .executeTakeFirstOrThrow()
  if (count > 1) return
  throw new TarnwrightError("conflict", `An account keeps at least one owner. ${instead}`)
}
