import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { insertKey, type MadeKey } from "./create"
import { keyColumns } from "./row"

export interface Rotation {
  readonly key_id: string
  /** Hours that the old key goes on working beside its successor, 0 to 720. */
  readonly overlap_h: number
}

/**
 * Makes a successor with the same settings and lets the old key expire after the overlap.
 *
 * @throws TarnwrightError `not_found`; `conflict` when the key is revoked or already has a successor.
 */
export function rotateKey({ ctx, input }: Call<Rotation>): Promise<MadeKey> {
  return withTenant(ctx.account_id, async (trx) => {
    const old = await trx
      .selectFrom("api_key")
      .select(keyColumns)
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", input.key_id)
      .forUpdate()
      .executeTakeFirst()
    if (!old) throw new TarnwrightError("not_found", "There is no such key in this account.")
    if (old.revoked_at || old.successor_id) {
      throw new TarnwrightError(
        "conflict",
        "This key was revoked or rotated already. Make a new key instead.",
      )
    }

    const { kind, mode, name, scopes, origins, cidrs } = old
    const made = await insertKey(trx, ctx, { kind, mode, name, scopes, origins, cidrs })
    const end = new Date(ctx.now.getTime() + input.overlap_h * 3_600_000)
    await trx
      .updateTable("api_key")
      .set({
        successor_id: made.key.id,
        expires_at: old.expires_at && old.expires_at < end ? old.expires_at : end,
      })
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", old.id)
      .execute()
    await recordAct(trx, ctx, {
      action: "key.rotated",
      target: old.id,
      detail: { successor_id: made.key.id, overlap_h: input.overlap_h },
    })
    return made
  })
}
