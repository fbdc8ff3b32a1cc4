import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { type Endpoint, endpointColumns, endpointOf, MOST_ENDPOINTS, refuseUnfit } from "./endpoint"
import type { SubscribableEvent } from "./events"
import { newSecret, sealSecret } from "./secret"

export interface NewEndpoint {
  readonly url: string
  readonly events: readonly SubscribableEvent[]
}

/**
 * Makes an endpoint, to which each event of its list goes from now on.
 *
 * @throws TarnwrightError `validation_failed` for its URL or events; `conflict` when the account has as many endpoints
 * as it may have.
 */
export async function createEndpoint({ ctx, input }: Call<NewEndpoint>): Promise<Endpoint> {
  refuseUnfit(input)
  return withTenant(ctx.account_id, async (trx) => {
    // The account's row stays locked to the end, so that two at once cannot both be the last.
    await trx
      .selectFrom("account")
      .select("id")
      .where("id", "=", ctx.account_id)
      .forUpdate()
      .executeTakeFirstOrThrow()
    const { count } = await trx
      .selectFrom("webhook_endpoint")
      .select((select) => select.fn.countAll<number>().as("count"))
      .where("account_id", "=", ctx.account_id)
      .executeTakeFirstOrThrow()
    if (count >= MOST_ENDPOINTS) {
      throw new TarnwrightError(
        "conflict",
        `An account can have ${MOST_ENDPOINTS} endpoints. Delete one first.`,
      )
    }
    const id = newId("webhook_endpoint")
    const stored = await trx
      .insertInto("webhook_endpoint")
      .values({
        account_id: ctx.account_id,
        id,
        url: input.url,
        events: [...new Set(input.events)],
        secret: sealSecret(newSecret(), id),
        previous_secret: null,
        previous_secret_until: null,
        created_at: ctx.now,
        updated_at: ctx.now,
        disabled_at: null,
        disabled_reason: null,
      })
      .returning(endpointColumns)
      .executeTakeFirstOrThrow()
    await recordAct(trx, ctx, {
      action: "webhook.created",
      target: id,
      detail: { url: stored.url, events: stored.events },
    })
    return endpointOf(stored)
  })
}
