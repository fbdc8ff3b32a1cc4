import { type Trx, withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { notifyOwners } from "@/lib/mail"
import { publishEvent } from "@/lib/webhooks"
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
    return revokeFoundKey(trx, ctx, key, input.reason)
  })
}

/**
 * Revokes a key that is in force: marks it, records the act, tells the owners by mail and the endpoints by webhook. A
 * trigger of the database announces it to every process.
 */
export async function revokeFoundKey(
  trx: Trx,
  ctx: Ctx,
  key: KeyRow,
  reason: string | undefined,
): Promise<KeyRow> {
  const revoked = {
    revoked_at: ctx.now,
    revoked_by: ctx.actor.id,
    revoked_reason: reason ?? null,
  }
  const { numUpdatedRows } = await trx
    .updateTable("api_key")
    .set(revoked)
    .where("account_id", "=", key.account_id)
    .where("id", "=", key.id)
    .where("revoked_at", "is", null)
    .executeTakeFirstOrThrow()
  // Another call was faster, and has told everybody.
  if (numUpdatedRows === 0n) return { ...key, ...revoked }

  await recordAct(trx, ctx, { action: "key.revoked", target: key.id, detail: { reason: reason ?? null } })
  const revoked_by = await nameOf(trx, ctx)
  await notifyOwners(trx, key.account_id, ({ account_name, portal_url }) => ({
    template: "key_revoked",
    data: {
      account_name,
      key_name: key.name,
      last4: key.last4,
      revoked_by,
      reason: reason ?? "",
      keys_url: `${portal_url}/keys`,
    },
  }))
  const { id: key_id, name, kind, mode, last4 } = key
  await publishEvent(trx, key.account_id, "key.revoked", {
    key_id,
    name,
    kind,
    mode,
    last4,
    reason: reason ?? null,
    revoked_at: ctx.now.toISOString(),
  })
  return { ...key, ...revoked }
}

/** Who acts, as a letter to the owners names them. */
async function nameOf(trx: Trx, { actor }: Ctx): Promise<string> {
  if (actor.kind !== "user") return "the Tarnwright team"
  const person = await trx
    .selectFrom("app_user")
    .select("name")
    .where("id", "=", actor.id)
    .executeTakeFirstOrThrow()
  return person.name
}
