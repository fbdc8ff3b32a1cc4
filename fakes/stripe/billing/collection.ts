import type { ApiError } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { collect, type Invoice, subscriptionOf } from "./invoices"
import { applyPendingUpdate } from "./pending-update"
import { setStatus } from "./status"
import type { Subscription } from "./subscription-shape"

const DAY_S = 86_400
/** Days from one attempt on a renewal to the next; then the account's choice of `afterDunning` applies. */
const RETRY_DAYS = [3, 5, 7]

/** Charges an open invoice and lets its subscription feel the outcome. Returns why the card refused, if it did. */
export function settle(fake: Fake, invoice: Invoice, confirmed = false): ApiError | undefined {
  const declined = collect(fake, invoice, confirmed)
  const subscription = subscriptionOf(fake, invoice)
  if (subscription && declined) afterFailure(fake, invoice, subscription)
  else if (subscription) afterPayment(fake, invoice, subscription)
  fake.changed()
  return declined
}

function afterPayment(fake: Fake, invoice: Invoice, subscription: Subscription): void {
  applyPendingUpdate(fake, subscription, invoice)
  const waiting = ["incomplete", "past_due", "unpaid"].includes(subscription.status)
  if (waiting && idOf(subscription.latest_invoice) === invoice.id) setStatus(fake, subscription, "active")
}

function afterFailure(fake: Fake, invoice: Invoice, subscription: Subscription): void {
  if (invoice.billing_reason !== "subscription_cycle") return
  const wait = RETRY_DAYS[invoice.attempt_count - 1]
  if (wait !== undefined) {
    invoice.next_payment_attempt = fake.now(idOf(invoice.customer)) + wait * DAY_S
    if (subscription.status === "active") setStatus(fake, subscription, "past_due")
    return
  }
  invoice.next_payment_attempt = null
  if (subscription.status !== "canceled")
    setStatus(fake, subscription, fake.state.afterDunning, "payment_failed")
}
