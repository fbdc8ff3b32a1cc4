import { type Role, withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import type { Ctx } from "@/lib/context"

export interface Member {
  readonly user_id: string
  readonly name: string
  readonly email: string
  readonly role: Role
  readonly created_at: Date
}

/** The people of an account, in the order in which they joined. */
export function listTeam({ ctx }: { ctx: Ctx }): Promise<Member[]> {
  authorize(ctx.actor, "team.read")
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("membership")
      .innerJoin("app_user", "app_user.id", "membership.user_id")
      .select([
        "membership.user_id",
        "app_user.name",
        "app_user.email",
        "membership.role",
        "membership.created_at",
      ])
      .where("membership.account_id", "=", ctx.account_id)
      .orderBy("membership.created_at")
      .orderBy("app_user.name")
      .execute(),
  )
}

/** Someone who was invited and has not come yet. */
export interface Invitation {
  readonly id: string
  readonly email: string
  readonly role: Role
  readonly invited_by: string
  readonly created_at: Date
  /** When its link stops working; it can be sent again after that. */
  readonly expires_at: Date
}

/** The invitations of an account that were not accepted yet, newest first. */
export function listInvitations({ ctx }: { ctx: Ctx }): Promise<Invitation[]> {
  authorize(ctx.actor, "team.manage")
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("invitation")
      .select(["id", "email", "role", "invited_by", "created_at", "expires_at"])
      .where("account_id", "=", ctx.account_id)
      .orderBy("id", "desc")
      .execute(),
  )
}
