import { asAdmin } from "@/db"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { revokeFoundKey } from "./revoke"
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
    return revokeFoundKey(trx, { ...ctx, account_id: key.account_id }, key, input.reason)
  })
}
