import type { Trx } from "@/db"

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
