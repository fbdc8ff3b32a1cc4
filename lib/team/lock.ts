import { sql } from "kysely"
import type { Trx } from "@/db"
import type { Ctx } from "@/lib/context"

/** Changes of one team wait for each other: the last owner and the plan's places are counted by one at a time. */
export async function lockTeam(
  trx: Trx,
  ctx: Pick<Ctx, "account_id">,
): Promise<{ name: string; plan: string }> {
  await sql`select pg_advisory_xact_lock(hashtextextended(${`team:${ctx.account_id}`}, 0))`.execute(trx)
  return trx
    .selectFrom("account")
    .select(["name", "plan"])
    .where("id", "=", ctx.account_id)
    .executeTakeFirstOrThrow()
}
