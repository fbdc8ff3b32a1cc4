import { type Selectable, sql } from "kysely"
import { asWorker, type Schema, type Trx } from "@/db"
import { recordAct } from "@/lib/audit"
import { env } from "@/lib/env"
import { notifyOwners } from "@/lib/mail"
import { queueAttempt } from "./publish"
import { nextAttemptAfter } from "./schedule"
import { signedHeaders } from "./secret"
import { type Outcome, send } from "./send"

type Delivery = Selectable<Schema["webhook_delivery"]>
type Endpoint = Selectable<Schema["webhook_endpoint"]>

/** Longer than an attempt can last, so that what a dead process began may be begun again. */
const claim_s = 60

/**
 * Makes one attempt of a delivery and notes how it ended; a failed one queues the next. Safe to repeat: a delivery that
 * is done, not due or being attempted elsewhere is left alone.
 */
export async function deliverWebhook(which: { account_id: string; delivery_id: string }): Promise<void> {
  const claimed = await asWorker((trx) => claim(trx, which))
  if (!claimed) return
  const { delivery, endpoint } = claimed
  const outcome = endpoint.disabled_at
    ? ({ status: null, failure: "endpoint_off", duration_ms: 0 } as const)
    : await attempt(delivery, endpoint)
  await asWorker((trx) => note(trx, delivery, endpoint, outcome))
}

/**
 * Queues again what should have been attempted and was not, since a process died with it.
 *
 * @returns how many deliveries were queued
 */
export async function recoverDeliveries(): Promise<number> {
  return asWorker(async (trx) => {
    const lost = await trx
      .selectFrom("webhook_delivery")
      .select(["account_id", "id", "endpoint_id"])
      .where("status", "=", "pending")
      .where("next_attempt_at", "<", sql<Date>`now() - interval '5 minutes'`)
      .where((where) =>
        where.or([where("claimed_until", "is", null), where("claimed_until", "<", sql<Date>`now()`)]),
      )
      .orderBy("next_attempt_at")
      .limit(500)
      .execute()
    for (const delivery of lost) await queueAttempt(trx, delivery)
    return lost.length
  })
}

async function claim(
  trx: Trx,
  { account_id, delivery_id }: { account_id: string; delivery_id: string },
): Promise<{ delivery: Delivery; endpoint: Endpoint } | undefined> {
  const delivery = await trx
    .updateTable("webhook_delivery")
    .set((value) => ({
      attempts: value("attempts", "+", 1),
      last_attempt_at: sql<Date>`now()`,
      claimed_until: sql<Date>`now() + make_interval(secs => ${claim_s})`,
    }))
    .where("account_id", "=", account_id)
    .where("id", "=", delivery_id)
    .where("status", "=", "pending")
    .where("next_attempt_at", "<=", sql<Date>`now()`)
    .where((where) =>
      where.or([where("claimed_until", "is", null), where("claimed_until", "<", sql<Date>`now()`)]),
    )
    .returningAll()
    .executeTakeFirst()
  if (!delivery) return undefined
  const endpoint = await trx
    .selectFrom("webhook_endpoint")
    .selectAll()
    .where("account_id", "=", account_id)
    .where("id", "=", delivery.endpoint_id)
    .executeTakeFirstOrThrow()
  return { delivery, endpoint }
}

function attempt(delivery: Delivery, endpoint: Endpoint): Promise<Outcome> {
  const headers = signedHeaders(endpoint, delivery, new Date())
  const policy = { allowLoopback: env().WEBHOOKS_ALLOW_LOOPBACK === "1" }
  return send({ url: endpoint.url, headers, body: delivery.payload }, policy)
}

async function note(trx: Trx, delivery: Delivery, endpoint: Endpoint, outcome: Outcome): Promise<void> {
  const now = new Date()
  const isFinal = outcome.failure === null || outcome.failure === "gone" || outcome.failure === "endpoint_off"
  const next = isFinal ? undefined : nextAttemptAfter(delivery.attempts, now, Math.random())
  await trx
    .updateTable("webhook_delivery")
    .set({
      status: outcome.failure === null ? "delivered" : next ? "pending" : "failed",
      next_attempt_at: next ?? null,
      claimed_until: null,
      last_status: outcome.status,
      last_failure: outcome.failure,
      last_duration_ms: outcome.duration_ms,
    })
    .where("account_id", "=", delivery.account_id)
    .where("id", "=", delivery.id)
    .execute()
  if (next) await queueAttempt(trx, delivery, next)
  if (outcome.failure === "gone") await switchOff(trx, endpoint, now)
}

/** @source Standard Webhooks specification: 410 means that the receiver wants no more. */
async function switchOff(trx: Trx, endpoint: Endpoint, now: Date): Promise<void> {
  const { account_id, id, url } = endpoint
  const { numUpdatedRows } = await trx
    .updateTable("webhook_endpoint")
    .set({ disabled_at: now, disabled_reason: "gone", updated_at: now })
    .where("account_id", "=", account_id)
    .where("id", "=", id)
    .where("disabled_at", "is", null)
    .executeTakeFirstOrThrow()
  if (numUpdatedRows === 0n) return
  const ctx = { account_id, actor: { kind: "system", id: "worker" }, now } as const
  await recordAct(trx, ctx, { action: "webhook.disabled", target: id, detail: { reason: "gone" } })
  await notifyOwners(trx, account_id, ({ account_name, portal_url }) => ({
    template: "webhook_disabled",
    data: { account_name, url, webhooks_url: `${portal_url}/webhooks` },
  }))
}
