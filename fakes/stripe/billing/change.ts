import { invalid } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import type { Objects } from "../core/state"
import { settle } from "./collection"
import { draftInvoice, finalize, type Invoice } from "./invoices"
import { type Item, isMetered, type Line, line, meteredLine, productName } from "./lines"
import { holdUpdate } from "./pending-update"
import { amountOf } from "./pricing"
import { currentPeriod } from "./renew"
import type { PaymentBehavior } from "./subscribe"
import { newItem, type Subscription } from "./subscription-shape"

export interface ItemChange {
  id?: string | undefined
  price?: string | undefined
  quantity?: number | undefined
  deleted?: boolean | undefined
  clear_usage?: boolean | undefined
}

export interface ChangeInput {
  items: ItemChange[]
  proration: "create_prorations" | "always_invoice" | "none"
  behavior: PaymentBehavior
  prorationDate: number | undefined
}

/**
 * Changes the items of a running subscription, with proration to the second.
 * Prorations under `create_prorations` are invoiced at once too: this stand-in keeps no pending invoice items.
 *
 * @throws ApiError 402 when the card refuses and the payment behaviour asks for an error
 */
export function changeItems(fake: Fake, subscription: Subscription, input: ChangeInput): void {
  const now = fake.now(idOf(subscription.customer))
  const items = changedItems(fake, subscription, input.items, now)
  const lines = input.proration === "none" ? [] : prorationLines(fake, subscription, items, input, now)
  const before = subscription.items.data
  if (lines.length === 0) {
    applyItems(fake, subscription, items, before)
    return
  }
  const invoice = updateInvoice(fake, subscription, lines, now)
  if (input.behavior === "pending_if_incomplete") {
    holdUpdate(fake, subscription, items, now)
    const declined = settle(fake, invoice)
    if (declined) fake.changed()
    return
  }
  const declined = settle(fake, invoice)
  if (declined && input.behavior === "error_if_incomplete") throw declined
  applyItems(fake, subscription, items, before)
}

/** The lines that a change would bring, without making it. */
export function prorationLines(
  fake: Fake,
  subscription: Subscription,
  items: Item[],
  input: Pick<ChangeInput, "prorationDate" | "items">,
  now: number,
): Line[] {
  const period = currentPeriod(subscription)
  const at = input.prorationDate ?? now
  if (at < period.start || at > period.end) {
    throw invalid(
      "Cannot specify proration_date outside of the current subscription period.",
      "proration_date",
    )
  }
  const rest = { start: at, end: period.end }
  const share = (period.end - at) / (period.end - period.start)
  const gone = subscription.items.data.filter((old) => !items.some((item) => isSame(item, old)))
  const added = items.filter((item) => !subscription.items.data.some((old) => isSame(item, old)))
  const cleared = new Set(input.items.filter((change) => change.clear_usage).map((change) => change.id))
  const customer = idOf(subscription.customer)!
  return [
    ...gone
      .filter((item) => isMetered(item) && !cleared.has(item.id))
      .map((item) => meteredLine(fake, item, customer, { start: period.start, end: at }))
      .filter((used) => used.amount > 0),
    ...gone.filter((item) => !isMetered(item)).map((item) => prorated(fake, item, -share, rest)),
    ...added.filter((item) => !isMetered(item)).map((item) => prorated(fake, item, share, rest)),
  ]
}

export function changedItems(
  fake: Fake,
  subscription: Subscription,
  changes: ItemChange[],
  now: number,
): Item[] {
  const period = currentPeriod(subscription)
  let items = [...subscription.items.data]
  for (const [index, change] of changes.entries()) {
    const old = change.id ? items.find((item) => item.id === change.id) : undefined
    if (change.id && !old) throw invalid(`No such subscription item: '${change.id}'`, `items[${index}][id]`)
    if (change.deleted) {
      items = items.filter((item) => item !== old)
      continue
    }
    const price = change.price ? fake.get("price", change.price, `items[${index}][price]`) : old?.price
    if (!price) throw invalid(`Missing required param: items[${index}][price].`, `items[${index}][price]`)
    const quantity = change.quantity ?? old?.quantity
    const next = newItem(subscription.id, { price, quantity, now, start: period.start, end: period.end })
    if (old) {
      const samePrice = old.price.id === price.id
      items[items.indexOf(old)] = { ...next, id: old.id, created: samePrice ? old.created : now }
    } else {
      items.push(next)
    }
  }
  if (items.length === 0) throw invalid("A subscription must have at least one active plan.", "items")
  return items
}

function applyItems(fake: Fake, subscription: Subscription, items: Item[], before: Item[]): void {
  subscription.items.data = items
  fake.emit("customer.subscription.updated", subscription, { items: { data: before } })
}

function updateInvoice(fake: Fake, subscription: Subscription, lines: Line[], now: number): Invoice {
  const customer = idOf(subscription.customer)!
  const reason = "subscription_update"
  const period = { start: now, end: now }
  const invoice: Objects["invoice"] = fake.put(
    "invoice",
    draftInvoice(fake, { customer, subscription, reason, lines, period }),
  )
  subscription.latest_invoice = invoice.id
  fake.emit("invoice.created", invoice)
  finalize(fake, invoice)
  return invoice
}

function isSame(a: Item, b: Item): boolean {
  return a.id === b.id && a.price.id === b.price.id && a.quantity === b.quantity
}

function prorated(fake: Fake, item: Item, share: number, period: { start: number; end: number }): Line {
  const quantity = item.quantity ?? 1
  const amount = Math.round(amountOf(item.price, quantity) * share)
  const words = share < 0 ? "Unused time on" : "Remaining time on"
  const description = `${words} ${quantity} × ${productName(fake, item)}`
  return line({ item, amount, quantity, period, description, proration: true })
}
