import type { Selectable } from "kysely"
import { type Schema, type Trx, withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newSecret, sealSecret, unsealSecret } from "./secret"

/** What a receiver verifies with. `previous_until`: until then the replaced secret signs as well. */
export interface ShownSecret {
  readonly secret: string
  readonly previous_until: Date | null
}

/**
 * The secret of one of the account's endpoints. Receiver and sender share it, so unlike a key it can be shown again.
 *
 * @throws TarnwrightError `not_found` when the account has no such endpoint.
 */
export function showSecret({ ctx, input }: Call<{ readonly endpoint_id: string }>): Promise<ShownSecret> {
  return withTenant(ctx.account_id, async (trx) => {
    const stored = await findSecret(trx, ctx, input.endpoint_id)
    const until = stored.previous_secret_until
    return {
      secret: unsealSecret(stored.secret, stored.id),
      previous_until: until && until > ctx.now ? until : null,
    }
  })
}

export interface SecretRotation {
  readonly endpoint_id: string
  /** Hours for which the replaced secret goes on signing beside the new one, 0 to 168. */
  readonly overlap_h: number
}

/**
 * Replaces the secret of one of the account's endpoints and says until when the old one signs as well. A secret that an
 * earlier rotation had replaced stops signing at once.
 *
 * @throws TarnwrightError `not_found` when the account has no such endpoint.
 */
export function rotateSecret({ ctx, input }: Call<SecretRotation>): Promise<{ previous_until: Date | null }> {
  return withTenant(ctx.account_id, async (trx) => {
    const { id, secret } = await findSecret(trx, ctx, input.endpoint_id)
    const overlaps = input.overlap_h > 0
    const until = new Date(ctx.now.getTime() + input.overlap_h * 3_600_000)
    await trx
      .updateTable("webhook_endpoint")
      .set({
        secret: sealSecret(newSecret(), id),
        previous_secret: overlaps ? secret : null,
        previous_secret_until: overlaps ? until : null,
        updated_at: ctx.now,
      })
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", id)
      .execute()
    await recordAct(trx, ctx, {
      action: "webhook.secret_rotated",
      target: id,
      detail: { overlap_h: input.overlap_h },
    })
    return { previous_until: overlaps ? until : null }
  })
}

async function findSecret(
  trx: Trx,
  ctx: Ctx,
  endpoint_id: string,
): Promise<Pick<Selectable<Schema["webhook_endpoint"]>, "id" | "secret" | "previous_secret_until">> {
  const stored = await trx
    .selectFrom("webhook_endpoint")
    .select(["id", "secret", "previous_secret_until"])
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", endpoint_id)
    .forUpdate()
    .executeTakeFirst()
  if (!stored) throw new TarnwrightError("not_found", "There is no such endpoint in this account.")
  return stored
}
