import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { authorize } from "./can"

/** Gives the account another name. Its slug, and with it every address, stays. */
export async function renameAccount({ ctx, input }: Call<{ readonly name: string }>): Promise<void> {
  authorize(ctx.actor, "account.manage")
  await withTenant(ctx.account_id, async (trx) => {
    const before = await trx
      .selectFrom("account")
      .select("name")
      .where("id", "=", ctx.account_id)
      .executeTakeFirstOrThrow()
    await trx.updateTable("account").set({ name: input.name }).where("id", "=", ctx.account_id).execute()
    await recordAct(trx, ctx, {
      action: "account.renamed",
      target: ctx.account_id,
      detail: { from: before.name, to: input.name },
    })
  })
}
