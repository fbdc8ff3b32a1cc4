import type { Selectable } from "kysely"
import { type Schema, withTenant } from "@/db"
import type { Call } from "@/lib/context"

export type AuditEntry = Selectable<Schema["audit_log"]>

/** The account's newest acts, newest first; those of one actor when `actor_id` is given. */
export function listActs({
  ctx,
  input,
}: Call<{ readonly limit: number; readonly actor_id?: string }>): Promise<AuditEntry[]> {
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("audit_log")
      .selectAll()
      .where("account_id", "=", ctx.account_id)
      .$if(input.actor_id !== undefined, (query) => query.where("actor_id", "=", input.actor_id!))
      .orderBy("id", "desc")
      .limit(input.limit)
      .execute(),
  )
}
