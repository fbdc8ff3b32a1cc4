import type { Selectable } from "kysely"
import { type Schema, type Trx, withTenant } from "@/db"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { findEndpoint } from "./endpoint"
import { webhookEvents } from "./events"
import { payloadOf, queueDelivery } from "./publish"
import type { DeliveryFailure } from "./send"

/** One event on its way to one endpoint, with how the last attempt went. */
export type Delivery = Omit<
  Selectable<Schema["webhook_delivery"]>,
  "account_id" | "claimed_until" | "last_failure"
> & {
  readonly last_failure: DeliveryFailure | null
}

const deliveryColumns = [
  "id",
  "endpoint_id",
  "event_id",
  "type",
  "payload",
  "status",
  "attempts",
  "created_at",
  "next_attempt_at",
  "last_attempt_at",
  "last_status",
  "last_failure",
  "last_duration_ms",
] as const satisfies readonly (keyof Delivery)[]

/** Days for which a delivery is kept. */
export const DELIVERY_DAYS = 30

export interface DeliveryQuery {
  readonly endpoint_id: string
  readonly status?: "pending" | "delivered" | "failed" | undefined
  readonly limit: number
  /** Id of the last delivery of the page before. */
  readonly before?: string | undefined
}

/**
 * Deliveries to one of the account's endpoints, newest first.
 *
 * @throws TarnwrightError `not_found` when the account has no such endpoint.
 */
export async function listDeliveries({ ctx, input }: Call<DeliveryQuery>): Promise<Delivery[]> {
  const { endpoint_id, status, limit, before } = input
  const stored = await withTenant(ctx.account_id, async (trx) => {
    await findEndpoint(trx, ctx, endpoint_id)
    return trx
      .selectFrom("webhook_delivery")
      .select(deliveryColumns)
      .where("account_id", "=", ctx.account_id)
      .where("endpoint_id", "=", endpoint_id)
      .$if(status !== undefined, (query) => query.where("status", "=", status!))
      .$if(before !== undefined, (query) => query.where("id", "<", before!))
      .orderBy("id", "desc")
      .limit(limit)
      .execute()
  })
  return stored.map(deliveryOf)
}

interface OneDelivery {
  readonly endpoint_id: string
  readonly delivery_id: string
}

/** @throws TarnwrightError `not_found` when the account has no such delivery. */
export function showDelivery({ ctx, input }: Call<OneDelivery>): Promise<Delivery> {
  return withTenant(ctx.account_id, (trx) => findDelivery(trx, ctx, input))
}

/**
 * Sends an event once more to the same endpoint: a new delivery of the same event id, by which a receiver knows that it
 * had it before.
 *
 * @throws TarnwrightError `not_found`; `conflict` when the endpoint is switched off.
 */
export function replayDelivery({ ctx, input }: Call<OneDelivery>): Promise<Delivery> {
  return withTenant(ctx.account_id, async (trx) => {
    const { event_id, type, payload } = await findDelivery(trx, ctx, input)
    return queueOne(trx, ctx, input.endpoint_id, {
      event_id,
      type: type as keyof typeof webhookEvents,
      payload,
    })
  })
}

/**
 * Sends the test event to one of the account's endpoints, whatever events it asked for.
 *
 * @throws TarnwrightError `not_found`; `conflict` when the endpoint is switched off.
 */
export function sendTestEvent({ ctx, input }: Call<{ readonly endpoint_id: string }>): Promise<Delivery> {
  const type = "webhook.test"
  return withTenant(ctx.account_id, (trx) =>
    queueOne(trx, ctx, input.endpoint_id, {
      event_id: newId("webhook_event"),
      type,
      payload: payloadOf(type, webhookEvents[type].example, ctx.now),
    }),
  )
}

async function queueOne(
  trx: Trx,
  ctx: Ctx,
  endpoint_id: string,
  event: { event_id: string; type: keyof typeof webhookEvents; payload: string },
): Promise<Delivery> {
  const { disabled_at } = await findEndpoint(trx, ctx, endpoint_id)
  if (disabled_at) {
    throw new TarnwrightError("conflict", "This endpoint is switched off. Switch it on first.")
  }
  const id = await queueDelivery(trx, { account_id: ctx.account_id, endpoint_id, ...event })
  return findDelivery(trx, ctx, { endpoint_id, delivery_id: id })
}

async function findDelivery(
  trx: Trx,
  ctx: Ctx,
  { endpoint_id, delivery_id }: OneDelivery,
): Promise<Delivery> {
  const stored = await trx
    .selectFrom("webhook_delivery")
    .select(deliveryColumns)
    .where("account_id", "=", ctx.account_id)
    .where("endpoint_id", "=", endpoint_id)
    .where("id", "=", delivery_id)
    .executeTakeFirst()
  if (!stored) throw new TarnwrightError("not_found", "There is no such delivery in this account.")
  return deliveryOf(stored)
}

function deliveryOf(stored: Omit<Delivery, "last_failure"> & { last_failure: string | null }): Delivery {
  return { ...stored, last_failure: stored.last_failure as DeliveryFailure | null }
}
