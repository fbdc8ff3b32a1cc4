import { enqueueJob, type Trx } from "@/db"
import { newId } from "@/lib/id"
import type { SubscribableEvent, WebhookData, WebhookEventType } from "./events"

/** Name of the job that makes one attempt; `scripts/worker.ts` has its task. */
export const DELIVER_WEBHOOK = "deliver_webhook"

/** Largest body that is sent. @source Standard Webhooks specification, "Payload size" */
const largestPayload_bytes = 20_000

/** Attempts to one endpoint at the same time: a slow one holds up its own events and nobody else's. */
const lanesPerEndpoint = 4

/**
 * Sends an event to every endpoint of the account that asked for its type. Queued in the caller's transaction: it is
 * sent if, and only if, that commits.
 */
export async function publishEvent<Type extends SubscribableEvent>(
  trx: Trx,
  account_id: string,
  type: Type,
  data: WebhookData<Type>,
): Promise<void> {
  const endpoints = await trx
    .selectFrom("webhook_endpoint")
    .select("id")
    .where("account_id", "=", account_id)
    .where("disabled_at", "is", null)
    .where((where) => where(where.val<string>(type), "=", where.fn.any("events")))
    .orderBy("id")
    .execute()
  const event_id = newId("webhook_event")
  const payload = payloadOf(type, data, new Date())
  for (const { id } of endpoints) {
    await queueDelivery(trx, { account_id, endpoint_id: id, event_id, type, payload })
  }
}

export interface NewDelivery {
  readonly account_id: string
  readonly endpoint_id: string
  readonly event_id: string
  readonly type: WebhookEventType
  readonly payload: string
}

/** Queues one delivery and gives its id. */
export async function queueDelivery(trx: Trx, delivery: NewDelivery): Promise<string> {
  const id = newId("webhook_delivery")
  await trx
    .insertInto("webhook_delivery")
    .values({
      ...delivery,
      id,
      claimed_until: null,
      last_attempt_at: null,
      last_status: null,
      last_failure: null,
      last_duration_ms: null,
    })
    .execute()
  await queueAttempt(trx, { account_id: delivery.account_id, id, endpoint_id: delivery.endpoint_id })
  return id
}

/** Queues the next attempt of a delivery, in place of one that waits. */
export async function queueAttempt(
  trx: Trx,
  delivery: { readonly account_id: string; readonly id: string; readonly endpoint_id: string },
  run_at?: Date,
): Promise<void> {
  const lane = Math.floor(Math.random() * lanesPerEndpoint)
  await enqueueJob(trx, {
    task: DELIVER_WEBHOOK,
    payload: { account_id: delivery.account_id, delivery_id: delivery.id },
    key: delivery.id,
    queue: `${delivery.endpoint_id}:${lane}`,
    ...(run_at && { run_at }),
  })
}

/**
 * The body of an event. @source Standard Webhooks specification, "Payload structure": type, timestamp, data.
 *
 * @throws Error when it is larger than a webhook may be: a fault of ours, since no event carries free text at length.
 */
export function payloadOf<Type extends WebhookEventType>(
  type: Type,
  data: WebhookData<Type>,
  at: Date,
): string {
  const payload = JSON.stringify({ type, timestamp: at.toISOString(), data })
  const size = Buffer.byteLength(payload)
  if (size >= largestPayload_bytes) throw new Error(`The event ${type} has ${size} bytes`)
  return payload
}
