import { type Role, type Trx, withTenant } from "@/db"
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

/** Name and address of each owner of an account, for a letter about it. */
export function ownersOf(trx: Trx, account_id: string): Promise<{ name: string; email: string }[]> {
  return trx
    .selectFrom("membership")
    .innerJoin("app_user", "app_user.id", "membership.user_id")
    .select(["app_user.name", "app_user.email"])
    .where("membership.account_id", "=", account_id)
    .where("membership.role", "=", "owner")
    .execute()
}
