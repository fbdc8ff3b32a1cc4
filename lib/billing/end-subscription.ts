import { withTenant } from "@/db"
import { dropSchedule } from "./change-plan"
import { reachStripe } from "./reach-stripe"
import { isRunning } from "./service-state"
import { stripe } from "./stripe-client"

/** Lets the subscription of an account end with its period, or go on after all. Does nothing where none runs. */
export async function setRenewal(account_id: string, renews: boolean): Promise<void> {
  const id = await runningId(account_id)
  if (!id) return
  await reachStripe(async () => {
    if (!renews) await dropSchedule(id)
    await stripe().subscriptions.update(id, { cancel_at_period_end: !renews })
  })
}

/** Ends the subscription of an account now. Does nothing where none runs. */
export async function endSubscription(account_id: string): Promise<void> {
  const id = await runningId(account_id)
  if (id) await reachStripe(() => stripe().subscriptions.cancel(id))
}

async function runningId(account_id: string): Promise<string | undefined> {
  const stored = await withTenant(account_id, (trx) =>
    trx
      .selectFrom("subscription")
      .select(["stripe_subscription_id as id", "status"])
      .where("account_id", "=", account_id)
      .executeTakeFirst(),
  )
  return stored && isRunning(stored.status) ? stored.id : undefined
}
