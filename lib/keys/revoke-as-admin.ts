import { asAdmin } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { markRevoked } from "./revoke"
import { type KeyRow, keyColumns } from "./row"

/**
 * Revokes a key of any account, with the reason that its owners are told by mail. For the platform's admin alone.
 *
 * @throws TarnwrightError `not_found`; `conflict` when it was revoked before.
 */
export function revokeKeyAsAdmin({
  ctx,
  input,
}: {
  ctx: Omit<Ctx, "account_id">
  input: { readonly key_id: string; readonly reason: string }
}): Promise<KeyRow> {
  return asAdmin(async (trx) => {
    const key = await trx
      .selectFrom("api_key")
      .select(keyColumns)
      .where("id", "=", input.key_id)
      .executeTakeFirst()
    if (!key) throw new TarnwrightError("not_found", "There is no key with this id.")
    if (key.revoked_at) throw new TarnwrightError("conflict", "This key was revoked before.")
    await markRevoked(trx, { key, by: ctx.actor.id, at: ctx.now, reason: input.reason })
    await recordAct(
      trx,
      { ...ctx, account_id: key.account_id },
      { action: "key.revoked", target: key.id, detail: { reason: input.reason } },
    )
    return { ...key, revoked_at: ctx.now, revoked_by: ctx.actor.id, revoked_reason: input.reason }
  })
}
