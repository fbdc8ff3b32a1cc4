import { asWorker, type Trx } from "@/db"
import { alarmingTypes } from "./event-types"
import { stripe } from "./stripe-client"
import { syncCustomer } from "./sync-customer"

/** Name of the job that works off an event; `scripts/worker.ts` has its task. */
export const PROCESS_STRIPE_EVENT = "process_stripe_event"

/**
 * Works off one event that was taken in. What the event says is not believed: it names a customer, whose state is read
 * anew, so that a repeated, late or reordered event ends where the newest would have.
 *
 * @throws Error when Stripe or the database cannot be reached: the queue tries again
 */
export function processStripeEvent({ input }: { input: { event_id: string } }): Promise<void> {
  const now = new Date()
  return asWorker(async (trx) => {
    const event = await trx
      .selectFrom("stripe_event")
      .select(["id", "type", "payload"])
      .where("id", "=", input.event_id)
      .where("processed_at", "is", null)
      .forUpdate()
      .executeTakeFirst()
    if (!event) return
    if (alarmingTypes.has(event.type)) await raiseAlarm(event)
    const { customer } = event.payload
    if (typeof customer === "string") await syncCustomer(trx, customer, now)
    if (event.type === "customer.deleted") await forgetCustomer(trx, String(customer))
    await trx.updateTable("stripe_event").set({ processed_at: now }).where("id", "=", event.id).execute()
  })
}

/** The account stays, and its next checkout makes a customer anew. */
async function forgetCustomer(trx: Trx, customer: string): Promise<void> {
  await trx
    .updateTable("account")
    .set({ stripe_customer_id: null })
    .where("stripe_customer_id", "=", customer)
    .execute()
}

/** Says in the log of the worker what a person has to look at. */
async function raiseAlarm({ id, type }: { id: string; type: string }): Promise<void> {
  const thin = type.startsWith("v1.") ? await stripe().v2.core.events.retrieve(id) : undefined
  console.error(JSON.stringify({ level: "error", event: "stripe_alarm", id, type, data: thin ?? null }))
}
