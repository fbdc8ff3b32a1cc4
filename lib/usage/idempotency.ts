import { type KeyMode, withTenant } from "@/db"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"

/** A call that names an idempotency key. `fingerprint` is a digest of its method, path and body. */
export interface IdempotentCall {
  readonly mode: KeyMode
  readonly key: string
  readonly fingerprint: Buffer
}

/** The answer that the first call with the key got. */
export interface KeptAnswer {
  readonly status: number
  readonly body: string
}

/** How long a key is remembered. */
export const REMEMBERED_H = 24

/** A first call that has not answered after this time is taken for dead, and its key for free. */
const givenUpAfter_ms = 60_000

/**
 * Claims the key for this call, or gives the answer that an earlier call with it got.
 *
 * @throws TarnwrightError `idempotency_conflict` when the key stands for another request; `conflict` while the first
 * call is still running.
 */
export function claimIdempotencyKey({
  ctx,
  input,
}: {
  ctx: Ctx
  input: IdempotentCall
}): Promise<KeptAnswer | undefined> {
  const { mode, key, fingerprint } = input
  return withTenant(ctx.account_id, async (trx) => {
    const claimed = await trx
      .insertInto("idempotency")
      .values({
        account_id: ctx.account_id,
        mode,
        key,
        fingerprint,
        claimed_at: ctx.now,
        status: null,
        body: null,
      })
      .onConflict((conflict) => conflict.doNothing())
      .returning("key")
      .executeTakeFirst()
    if (claimed) return undefined

    const kept = await trx
      .selectFrom("idempotency")
      .selectAll()
      .where("account_id", "=", ctx.account_id)
      .where("mode", "=", mode)
      .where("key", "=", key)
      .forUpdate()
      .executeTakeFirstOrThrow()
    const age_ms = ctx.now.getTime() - kept.claimed_at.getTime()
    const forgotten = age_ms > REMEMBERED_H * 3_600_000 || (kept.status === null && age_ms > givenUpAfter_ms)
    if (forgotten) {
      await trx
        .updateTable("idempotency")
        .set({ fingerprint, claimed_at: ctx.now, status: null, body: null })
        .where("account_id", "=", ctx.account_id)
        .where("mode", "=", mode)
        .where("key", "=", key)
        .execute()
      return undefined
    }
    if (!kept.fingerprint.equals(fingerprint)) {
      throw new TarnwrightError(
        "idempotency_conflict",
        "This Idempotency-Key was sent with another request. Use a new key for a new request.",
      )
    }
    if (kept.status === null || kept.body === null) {
      throw new TarnwrightError(
        "conflict",
        "The first call with this Idempotency-Key is still running. Try again soon.",
        {
          retryAfterS: 1,
        },
      )
    }
    return { status: kept.status, body: kept.body }
  })
}

/** Keeps the answer for calls that repeat the key. */
export async function keepAnswer({
  ctx,
  input,
}: {
  ctx: Ctx
  input: IdempotentCall & KeptAnswer
}): Promise<void> {
  await withTenant(ctx.account_id, (trx) =>
    trx
      .updateTable("idempotency")
      .set({ status: input.status, body: input.body })
      .where("account_id", "=", ctx.account_id)
      .where("mode", "=", input.mode)
      .where("key", "=", input.key)
      .execute(),
  )
}

/** Frees the key of a call that was refused, so that the mended call may use it. */
export async function freeIdempotencyKey({ ctx, input }: { ctx: Ctx; input: IdempotentCall }): Promise<void> {
  await withTenant(ctx.account_id, (trx) =>
    trx
      .deleteFrom("idempotency")
      .where("account_id", "=", ctx.account_id)
      .where("mode", "=", input.mode)
      .where("key", "=", input.key)
      .where("status", "is", null)
      .execute(),
  )
}
