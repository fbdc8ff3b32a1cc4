import { type Fake, idOf } from "../core/fake"
import { settle } from "./collection"
import { draftInvoice, finalize, type Invoice, setLines, subscriptionOf } from "./invoices"
import { isMetered, type Line, licensedLine, meteredLine } from "./lines"
import { periodEnd } from "./periods"
import { setStatus } from "./status"
import type { Subscription } from "./subscription-shape"

/** A renewal stays a draft for an hour, in which late usage still counts. @source Stripe docs, "Subscription invoices" */
const DRAFT_S = 3600

/** Ends the current period: the next one begins, or the subscription does end. */
export function renew(fake: Fake, subscription: Subscription): void {
  const ended = currentPeriod(subscription)
  if (
    subscription.cancel_at_period_end ||
    (subscription.cancel_at ?? Number.POSITIVE_INFINITY) <= ended.end
  ) {
    end(fake, subscription)
    return
  }
  const recurring = subscription.items.data[0]!.price.recurring!
  const next = { start: ended.end, end: periodEnd(subscription.billing_cycle_anchor, recurring, ended.end) }
  for (const item of subscription.items.data) {
    item.current_period_start = next.start
    item.current_period_end = next.end
  }
  const lines = cycleLines(fake, subscription, ended, next)
  const customer = idOf(subscription.customer)!
  const reason = "subscription_cycle"
  const invoice = fake.put(
    "invoice",
    draftInvoice(fake, { customer, subscription, reason, lines, period: ended }),
  )
  // A subscription that is already unpaid piles up drafts, which nobody tries to collect.
  const collected = subscription.status !== "unpaid" && subscription.status !== "paused"
  invoice.auto_advance = collected
  invoice.automatically_finalizes_at = collected ? fake.now(customer) + DRAFT_S : null
  subscription.latest_invoice = invoice.id
  fake.emit("invoice.created", invoice)
  fake.emit("customer.subscription.updated", subscription, { items: { data: [] }, latest_invoice: null })
}

/** Ends a subscription now; what a metered price has counted so far is billed. */
export function end(fake: Fake, subscription: Subscription): void {
  const period = currentPeriod(subscription)
  const customer = idOf(subscription.customer)!
  const until = Math.min(fake.now(customer), period.end)
  const lines = subscription.items.data
    .filter(isMetered)
    .map((item) => meteredLine(fake, item, customer, { start: period.start, end: until }))
    .filter((line) => line.amount > 0)
  setStatus(fake, subscription, "canceled", "cancellation_requested")
  if (lines.length === 0) return
  const reason = "subscription_cycle"
  const invoice = fake.put("invoice", draftInvoice(fake, { customer, subscription, reason, lines, period }))
  subscription.latest_invoice = invoice.id
  fake.emit("invoice.created", invoice)
  finalize(fake, invoice)
  settle(fake, invoice)
}

/** Turns a renewal's draft into a bill: usage is counted once more, then the card is charged. */
export function closeDraft(fake: Fake, invoice: Invoice): void {
  const subscription = subscriptionOf(fake, invoice)
  if (subscription) {
    const used = { start: invoice.period_start, end: invoice.period_end }
    setLines(invoice, recounted(fake, subscription, invoice, used))
  }
  finalize(fake, invoice)
  settle(fake, invoice)
}

export function cycleLines(
  fake: Fake,
  subscription: Subscription,
  used: { start: number; end: number },
  next: { start: number; end: number },
): Line[] {
  const customer = idOf(subscription.customer)!
  return subscription.items.data.map((item) =>
    isMetered(item) ? meteredLine(fake, item, customer, used) : licensedLine(fake, item, next),
  )
}

export function currentPeriod(subscription: Subscription): { start: number; end: number } {
  const items = subscription.items.data
  return {
    start: Math.min(...items.map((item) => item.current_period_start)),
    end: Math.min(...items.map((item) => item.current_period_end)),
  }
}

function recounted(
  fake: Fake,
  subscription: Subscription,
  invoice: Invoice,
  used: { start: number; end: number },
): Line[] {
  return invoice.lines.data.map((line) => {
    const itemId = line.parent?.subscription_item_details?.subscription_item
    const item = subscription.items.data.find((one) => one.id === itemId)
    if (!item || !isMetered(item)) return line
    return { ...meteredLine(fake, item, idOf(subscription.customer)!, used), id: line.id }
  })
}
