import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { type Endpoint, endpointColumns, endpointOf, findEndpoint, refuseUnfit } from "./endpoint"
import type { SubscribableEvent } from "./events"

export interface EndpointChange {
  readonly endpoint_id: string
  readonly url?: string | undefined
  readonly events?: readonly SubscribableEvent[] | undefined
  /** A switched-off endpoint gets nothing, also later nothing of what happened meanwhile. */
  readonly disabled?: boolean | undefined
}

/**
 * Changes one of the account's endpoints. What waits to be sent goes to the new URL.
 *
 * @throws TarnwrightError `not_found`; `validation_failed` for its URL or events.
 */
export function updateEndpoint({ ctx, input }: Call<EndpointChange>): Promise<Endpoint> {
  return withTenant(ctx.account_id, async (trx) => {
    const before = await findEndpoint(trx, ctx, input.endpoint_id)
    const url = input.url ?? before.url
    const events = [...new Set(input.events ?? before.events)]
    refuseUnfit({ url, events })
    const disabled = input.disabled ?? before.disabled_at !== null
    const stored = await trx
      .updateTable("webhook_endpoint")
      .set({
        url,
        events,
        disabled_at: disabled ? (before.disabled_at ?? ctx.now) : null,
        disabled_reason: disabled ? (before.disabled_reason ?? "paused") : null,
        updated_at: ctx.now,
      })
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", input.endpoint_id)
      .returning(endpointColumns)
      .executeTakeFirstOrThrow()
    await recordAct(trx, ctx, {
      action: "webhook.changed",
      target: stored.id,
      detail: { url, events, disabled },
    })
    return endpointOf(stored)
  })
}

/**
 * Deletes one of the account's endpoints, with its deliveries.
 *
 * @throws TarnwrightError `not_found` when the account has no such endpoint.
 */
export async function deleteEndpoint({ ctx, input }: Call<{ readonly endpoint_id: string }>): Promise<void> {
  await withTenant(ctx.account_id, async (trx) => {
    const { id, url } = await findEndpoint(trx, ctx, input.endpoint_id)
    await trx
      .deleteFrom("webhook_endpoint")
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", id)
      .execute()
    await recordAct(trx, ctx, { action: "webhook.deleted", target: id, detail: { url } })
  })
}
