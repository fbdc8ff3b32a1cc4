import { enqueueJob, withoutTenant } from "@/db"
import { env } from "@/lib/env"
import { alarmingTypes, syncedTypes } from "./event-types"
import { PROCESS_STRIPE_EVENT } from "./process-stripe-event"
import { stripe } from "./stripe-client"

/** A request to the webhook address, as it came. */
export interface Delivery {
  /** The body, byte for byte: an encoder's second rendering of the same JSON has another signature. */
  readonly body: string
  /** The `stripe-signature` header. */
  readonly signature: string | null
  readonly now: Date
}

/** `known`: it came before; `ignored`: of a type that nothing here depends on. */
export type Receipt =
  | { readonly outcome: "accepted" | "known" | "ignored" }
  | { readonly outcome: "refused"; readonly reason: string }

const TOLERANCE_S = 300

/**
 * Takes in one event: checks its signature, keeps its id, and queues the work, all within one transaction.
 *
 * @throws DatabaseUnavailable when it could not be kept; the sender then tries again
 */
export async function receiveStripeEvent(delivery: Delivery): Promise<Receipt> {
  const reason = refusal(delivery)
  if (reason) return { outcome: "refused", reason }
  const event = JSON.parse(delivery.body) as IncomingEvent
  const wanted = syncedTypes.has(event.type) || alarmingTypes.has(event.type)
  return withoutTenant(async (trx) => {
    const inserted = await trx
      .insertInto("stripe_event")
      .values({
        id: event.id,
        type: event.type,
        // The worker reads everything anew, so a customer's name and address need not be kept here.
        payload: JSON.stringify({ customer: customerOf(event), created: event.created }),
        received_at: delivery.now,
        processed_at: wanted ? null : delivery.now,
      })
      .onConflict((conflict) => conflict.column("id").doNothing())
      .executeTakeFirst()
    if (inserted.numInsertedOrUpdatedRows === 0n) return { outcome: "known" }
    if (!wanted) return { outcome: "ignored" }
    await enqueueJob(trx, { task: PROCESS_STRIPE_EVENT, payload: { event_id: event.id } })
    return { outcome: "accepted" }
  })
}

interface IncomingEvent {
  id: string
  object: "event" | "v2.core.event"
  type: string
  created: number | string
  data?: { object?: { id?: string; object?: string; customer?: string | { id: string } | null } }
}

/** Why the delivery is not from Stripe, or not from now; undefined when it is. */
function refusal({ body, signature, now }: Delivery): string | undefined {
  if (!signature) return "There is no signature."
  const sent = Number(/(?:^|,)t=(\d+)/.exec(signature)?.[1])
  // The SDK bounds a signature's age but not its future, so that a clock ahead would keep one valid for good.
  if (sent * 1000 > now.getTime() + TOLERANCE_S * 1000) return "The signature is from the future."
  try {
    stripe().webhooks.signature!.verifyHeader(
      body,
      signature,
      env().STRIPE_WEBHOOK_SECRET,
      TOLERANCE_S,
      undefined,
      now.getTime(),
    )
    return undefined
  } catch {
    return "The signature does not fit."
  }
}

function customerOf({ data }: IncomingEvent): string | null {
  const object = data?.object
  if (object?.object === "customer") return object.id ?? null
  const { customer } = object ?? {}
  return typeof customer === "string" ? customer : (customer?.id ?? null)
}
