import { withTenant } from "@/db"
import type { Ctx } from "@/lib/context"
import { type KeyRow, keyColumns } from "./row"

/** The account's keys, newest first, revoked ones among them. */
export function listKeys({ ctx }: { ctx: Ctx }): Promise<KeyRow[]> {
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("api_key")
      .select(keyColumns)
      .where("account_id", "=", ctx.account_id)
      .orderBy("created_at", "desc")
      .execute(),
  )
}
