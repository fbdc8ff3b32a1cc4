import { type Trx, withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { type KeyRow, keyColumns } from "./row"

export interface Revocation {
  readonly key_id: string
  readonly reason?: string
}

/**
 * Revokes one of the account's keys, at once and for good. Revoking it again changes nothing.
 *
 * @throws TarnwrightError `not_found` when the account has no such key.
 */
export function revokeKey({ ctx, input }: Call<Revocation>): Promise<KeyRow> {
  return withTenant(ctx.account_id, async (trx) => {
    const key = await trx
      .selectFrom("api_key")
      .select(keyColumns)
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", input.key_id)
      .executeTakeFirst()
    if (!key) throw new TarnwrightError("not_found", "There is no such key in this account.")
    if (key.revoked_at) return key
    await markRevoked(trx, { key, by: ctx.actor.id, at: ctx.now, reason: input.reason })
    await recordAct(trx, ctx, {
      action: "key.revoked",
      target: key.id,
      detail: { reason: input.reason ?? null },
    })
    return { ...key, revoked_at: ctx.now, revoked_by: ctx.actor.id, revoked_reason: input.reason ?? null }
  })
}

/** Marks a key revoked; a trigger of the database announces it to every process. */
export async function markRevoked(
  trx: Trx,
  {
    key,
    by,
    at,
    reason,
  }: { key: Pick<KeyRow, "account_id" | "id">; by: string; at: Date; reason: string | undefined },
): Promise<void> {
  await trx
    .updateTable("api_key")
    .set({ revoked_at: at, revoked_by: by, revoked_reason: reason ?? null })
    .where("account_id", "=", key.account_id)
    .where("id", "=", key.id)
    .where("revoked_at", "is", null)
    .execute()
}
