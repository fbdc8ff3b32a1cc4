import type { Fake } from "../core/fake"
import type { Invoice } from "./invoices"
import type { Item } from "./lines"
import type { Subscription } from "./subscription-shape"

const EXPIRES_S = 23 * 3600

/** Keeps a change aside until its invoice is paid. @source Stripe docs, "Pending updates" */
export function holdUpdate(fake: Fake, subscription: Subscription, items: Item[], now: number): void {
  subscription.pending_update = {
    billing_cycle_anchor: null,
    cancel_at_period_end: null,
    discount: null,
    discounts: null,
    expires_at: now + EXPIRES_S,
    metadata: null,
    subscription_items: items,
    trial_end: null,
    trial_from_plan: null,
  }
  fake.emit("customer.subscription.updated", subscription, { pending_update: null })
}

export function applyPendingUpdate(fake: Fake, subscription: Subscription, invoice: Invoice): void {
  const items = subscription.pending_update?.subscription_items
  if (!items || invoice.billing_reason !== "subscription_update") return
  const before = subscription.items.data
  subscription.items.data = items
  subscription.pending_update = null
  fake.emit("customer.subscription.pending_update_applied", subscription)
  fake.emit("customer.subscription.updated", subscription, { items: { data: before } })
}

export function dropPendingUpdate(fake: Fake, subscription: Subscription): void {
  subscription.pending_update = null
  fake.emit("customer.subscription.pending_update_expired", subscription)
}
