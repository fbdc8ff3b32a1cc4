import { type KeyKind, type KeyMode, type Trx, withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { isAllowedOrigin } from "./origin"
import { type KeyRow, keyColumns } from "./row"
import { digestOf, newSecret } from "./secret"

export interface NewKey {
  readonly kind: KeyKind
  readonly mode: KeyMode
  readonly name: string
  readonly scopes: readonly string[]
  readonly origins?: readonly string[]
  readonly cidrs?: readonly string[]
  readonly expires_at?: Date | null
}

/** A key just made. `secret` is in this answer and nowhere else: it cannot be shown again. */
export interface MadeKey {
  readonly key: KeyRow
  readonly secret: string
}

/**
 * Makes a key.
 *
 * @throws TarnwrightError `validation_failed` when a browser key has no origin, a scope beyond `calculate`, or a
 * malformed origin.
 */
export function createKey({ ctx, input }: Call<NewKey>): Promise<MadeKey> {
  return withTenant(ctx.account_id, (trx) => insertKey(trx, ctx, input))
}

/** As {@link createKey}, in the caller's transaction. */
export async function insertKey(trx: Trx, ctx: Ctx, input: NewKey): Promise<MadeKey> {
  refuseUnfit(input)
  const secret = newSecret(input.kind, input.mode)
  const key = await trx
    .insertInto("api_key")
    .values({
      account_id: ctx.account_id,
      id: newId("key"),
      kind: input.kind,
      mode: input.mode,
      name: input.name,
      ...digestOf(secret),
      last4: secret.slice(-4),
      scopes: [...input.scopes],
      origins: [...(input.origins ?? [])],
      cidrs: [...(input.cidrs ?? [])],
      created_by: ctx.actor.id,
      created_at: ctx.now,
      expires_at: input.expires_at ?? null,
    })
    .returning(keyColumns)
    .executeTakeFirstOrThrow()
  await recordAct(trx, ctx, {
    action: "key.created",
    target: key.id,
    detail: { name: key.name, kind: key.kind, mode: key.mode, scopes: key.scopes, origins: key.origins },
  })
  return { key, secret }
}

function refuseUnfit({ kind, scopes, origins = [] }: NewKey): void {
  if (kind === "browser" && scopes.some((scope) => scope !== "calculate")) {
    throw invalid("/scopes", "A browser key is public, so it can have the scope calculate and no other.")
  }
  if (kind === "browser" && origins.length === 0) {
    throw invalid(
      "/origins",
      "Name at least one origin on which the browser key may be used, as https://shop.example.",
    )
  }
  const malformed = origins.findIndex((origin) => !isAllowedOrigin(origin))
  if (malformed >= 0) {
    throw invalid(
      `/origins/${malformed}`,
      "Write an origin as https://shop.example or https://*.shop.example.",
    )
  }
}

function invalid(pointer: string, detail: string): TarnwrightError {
  return new TarnwrightError("validation_failed", detail, { errors: [{ pointer, detail }] })
}
