import type { Selectable } from "kysely"
import { type Schema, withTenant } from "@/db"
import type { Call } from "@/lib/context"

/** An act, with the name of the person who did it; null when it was no person of an account, or they are gone. */
export interface AuditEntry extends Selectable<Schema["audit_log"]> {
  readonly actor_name: string | null
}

/** The account's newest acts, newest first; those of one actor when `actor_id` is given. */
export function listActs({
  ctx,
  input,
}: Call<{ readonly limit: number; readonly actor_id?: string }>): Promise<AuditEntry[]> {
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("audit_log")
      .leftJoin("app_user", (join) =>
        join.onRef("app_user.id", "=", "audit_log.actor_id").on("audit_log.actor_kind", "=", "user"),
      )
      .selectAll("audit_log")
      .select("app_user.name as actor_name")
      .where("audit_log.account_id", "=", ctx.account_id)
      .$if(input.actor_id !== undefined, (query) => query.where("audit_log.actor_id", "=", input.actor_id!))
      .orderBy("audit_log.id", "desc")
      .limit(input.limit)
      .execute(),
  )
}
