import { type ApiError, invalid } from "../core/errors"
import type { Fake } from "../core/fake"
import { refusal } from "./cards"
import { settle } from "./collection"
import { draftInvoice, finalize, type Invoice } from "./invoices"
import { isMetered, licensedLine } from "./lines"
import { periodEnd } from "./periods"
import { blankSubscription, type NewSubscription, type Subscription } from "./subscription-shape"

export type PaymentBehavior =
  | "allow_incomplete"
  | "default_incomplete"
  | "error_if_incomplete"
  | "pending_if_incomplete"

/**
 * Starts a subscription and collects its first invoice.
 *
 * @param how.confirmed the cardholder is present and has approved
 * @throws ApiError 402 under `error_if_incomplete` when the card refuses, leaving nothing behind
 */
export function subscribe(
  fake: Fake,
  input: Omit<NewSubscription, "now" | "testClock">,
  how: { behavior: PaymentBehavior; confirmed: boolean },
): { subscription: Subscription; invoice: Invoice; declined: ApiError | undefined } {
  const customer = fake.get("customer", input.customer, "customer")
  checkItems(input)
  if (how.behavior === "error_if_incomplete") refuseEarly(fake, input, how.confirmed)
  const now = fake.now(customer.id)
  const end = periodEnd(now, input.items[0]!.price.recurring!, now)
  const testClock = typeof customer.test_clock === "string" ? customer.test_clock : null
  const subscription = fake.put("subscription", blankSubscription({ ...input, now, testClock }, end))
  customer.currency ??= subscription.currency
  fake.emit("customer.subscription.created", subscription)
  const invoice = openInvoice(fake, subscription, { start: now, end: now })
  const declined = how.behavior === "default_incomplete" ? undefined : settle(fake, invoice, how.confirmed)
  return { subscription, invoice, declined }
}

function openInvoice(
  fake: Fake,
  subscription: Subscription,
  period: { start: number; end: number },
): Invoice {
  const lines = subscription.items.data
    .filter((item) => !isMetered(item))
    .map((item) =>
      licensedLine(fake, item, { start: item.current_period_start, end: item.current_period_end }),
    )
  const customer = String(subscription.customer)
  const draft = draftInvoice(fake, { customer, subscription, reason: "subscription_create", lines, period })
  const invoice = fake.put("invoice", draft)
  subscription.latest_invoice = invoice.id
  fake.emit("invoice.created", invoice)
  finalize(fake, invoice)
  return invoice
}

function checkItems(input: Pick<NewSubscription, "items">): void {
  const [first, ...others] = input.items
  if (!first) throw invalid("Missing required param: items.", "items", "parameter_missing")
  for (const { price, quantity } of input.items) {
    if (!price.recurring) throw invalid("The price specified is not recurring.", "items[0][price]")
    if (!price.active) throw invalid(`The price specified is inactive: ${price.id}`, "items[0][price]")
    if (price.recurring.usage_type === "metered" && quantity !== undefined) {
      throw invalid("A metered price takes no quantity.", "items[0][quantity]")
    }
  }
  const sameRhythm = others.every(
    ({ price }) =>
      price.recurring!.interval === first.price.recurring!.interval &&
      price.recurring!.interval_count === first.price.recurring!.interval_count &&
      price.currency === first.price.currency,
  )
  if (!sameRhythm) throw invalid("All prices of a subscription need the same interval and currency.", "items")
}

function refuseEarly(
  fake: Fake,
  input: Omit<NewSubscription, "now" | "testClock">,
  confirmed: boolean,
): void {
  const customer = fake.get("customer", input.customer)
  const card = input.defaultPaymentMethod ?? customer.invoice_settings.default_payment_method
  if (!card) throw invalid("This customer has no attached payment source or default payment method.")
  const declined = refusal(fake.state.cards[String(card)]!, confirmed)
  if (declined) throw declined
}
