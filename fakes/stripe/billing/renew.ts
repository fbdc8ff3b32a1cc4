import { type Fake, idOf } from "../core/fake"
import { settle } from "./collection"
import { draftInvoice, finalize, type Invoice, setLines } from "./invoices"
import { isMetered, type Line, licensedLine, meteredLine } from "./lines"
import { usage } from "./metering"
import { periodEnd } from "./periods"
import { amountOf } from "./pricing"
import { itemsOfPeriod } from "./schedule"
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
  const customer = idOf(subscription.customer)!
  const used = usedLines(fake, subscription, ended)
  subscription.items.data = itemsOfPeriod(fake, subscription, next)
  const lines = [...used, ...paidAheadLines(fake, subscription, next)]
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
  setLines(invoice, recounted(fake, invoice))
  finalize(fake, invoice)
  settle(fake, invoice)
}

export function usedLines(
  fake: Fake,
  subscription: Subscription,
  used: { start: number; end: number },
): Line[] {
  const customer = idOf(subscription.customer)!
  return subscription.items.data.filter(isMetered).map((item) => meteredLine(fake, item, customer, used))
}

export function paidAheadLines(
  fake: Fake,
  subscription: Subscription,
  next: { start: number; end: number },
): Line[] {
  return subscription.items.data
    .filter((item) => !isMetered(item))
    .map((item) => licensedLine(fake, item, next))
}

export function currentPeriod(subscription: Subscription): { start: number; end: number } {
  const items = subscription.items.data
  return {
    start: Math.min(...items.map((item) => item.current_period_start)),
    end: Math.min(...items.map((item) => item.current_period_end)),
  }
}

/** The lines of a draft, those of metered prices counted anew: readings may have come in the meantime. */
function recounted(fake: Fake, invoice: Invoice): Line[] {
  return invoice.lines.data.map((line) => {
    const price = fake.state.objects.price[idOf(line.pricing?.price_details?.price ?? null) ?? ""]
    const meter = price?.recurring?.meter && fake.state.objects["billing.meter"][price.recurring.meter]
    if (!price || !meter) return line
    const quantity = usage(fake, meter, idOf(invoice.customer)!, line.period.start, line.period.end)
    const amount = amountOf(price, quantity)
    const description = line.description?.replace(/^\d+/, String(quantity)) ?? null
    return { ...line, amount, subtotal: amount, quantity, quantity_decimal: String(quantity), description }
  })
}
