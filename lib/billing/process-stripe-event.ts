import { sql } from "kysely"
import { asWorker, type Trx } from "@/db"
import { alarmingTypes, syncedTypes } from "./event-types"
import { lockBilling } from "./lock"
import { stripe } from "./stripe-client"
import { syncAccount } from "./sync-account"

/** Name of the job that works off an event; `scripts/worker.ts` has its task. */
export const PROCESS_STRIPE_EVENT = "process_stripe_event"

/**
 * Works off one event that was taken in. What the event says is not believed: it names a customer, whose state is read
 * anew, so that a repeated, late or reordered event ends where the newest would have. One reading works off all events
 * of the customer that waited before it, since it is newer than every one of them.
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
      .executeTakeFirst()
    if (!event) return
    if (alarmingTypes.has(event.type)) await raiseAlarm(event)
    const { customer } = event.payload
    const done = typeof customer === "string" ? await readAnew(trx, customer, now) : []
    await trx
      .updateTable("stripe_event")
      .set({ processed_at: now })
      .where("id", "in", [event.id, ...done])
      .execute()
  })
}

/** Lets the customer's account follow its state, and says which events are thereby worked off. */
async function readAnew(trx: Trx, customer: string, now: Date): Promise<string[]> {
  const account = await trx
    .selectFrom("account")
    .select("id")
    .where("stripe_customer_id", "=", customer)
    .executeTakeFirst()
  // Not a customer of ours, or its account was deleted.
  if (!account) return []
  await lockBilling(trx, account.id)
  const waiting = await trx
    .selectFrom("stripe_event")
    .select(["id", "type"])
    .where("processed_at", "is", null)
    .where(sql<string>`payload ->> 'customer'`, "=", customer)
    .where("type", "in", [...syncedTypes])
    .execute()
  // While this job waited for the lock, another one's reading may have covered its event.
  if (waiting.length === 0) return []
  await syncAccount(trx, { account_id: account.id, customer }, now)
  if (waiting.some(({ type }) => type === "customer.deleted")) await forgetCustomer(trx, customer)
  return waiting.map(({ id }) => id)
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
