import { ApiError, invalid } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { takeFault } from "../core/faults"
import { newId } from "../core/ids"
import type { Objects } from "../core/state"
import { refusal } from "./cards"
import { blankInvoice } from "./invoice-shape"
import type { Line } from "./lines"

export type Invoice = Objects["invoice"]

export interface InvoiceInput {
  customer: string
  subscription: Objects["subscription"]
  reason: "subscription_create" | "subscription_cycle" | "subscription_update" | "upcoming"
  lines: Line[]
  period: { start: number; end: number }
}

/** A draft that is not stored yet, priced from its lines. */
export function draftInvoice(fake: Fake, input: InvoiceInput): Invoice {
  const id = newId(input.reason === "upcoming" ? "upcoming_in" : "in")
  const invoice = blankInvoice(fake, { ...input, id })
  setLines(invoice, input.lines)
  return invoice
}

export function setLines(invoice: Invoice, lines: Line[]): void {
  invoice.lines.data = lines.map((line) => ({ ...line, invoice: invoice.id }))
  const total = lines.reduce((sum, line) => sum + line.amount, 0)
  const due = Math.max(0, total + Math.min(0, invoice.starting_balance))
  Object.assign(invoice, {
    subtotal: total,
    subtotal_excluding_tax: total,
    total,
    total_excluding_tax: total,
    amount_due: due,
    amount_remaining: due,
  })
}

/** Gives the draft its number and makes it payable; a credit goes to the customer's balance. */
export function finalize(fake: Fake, invoice: Invoice): void {
  if (invoice.status !== "draft")
    throw invalid("This invoice is already finalized.", undefined, "invoice_not_editable")
  const customer = fake.get("customer", idOf(invoice.customer)!)
  fake.state.invoiceNumber += 1
  invoice.number = `PRACTICE-${String(fake.state.invoiceNumber).padStart(5, "0")}`
  invoice.status = "open"
  invoice.status_transitions.finalized_at = fake.now(customer.id)
  invoice.effective_at = invoice.status_transitions.finalized_at
  invoice.automatically_finalizes_at = null
  invoice.hosted_invoice_url = `${fake.base}/invoice/${invoice.id}`
  const used = invoice.total - invoice.amount_due
  customer.balance = invoice.total < 0 ? customer.balance + invoice.total : customer.balance + used
  invoice.ending_balance = customer.balance
  fake.emit("invoice.finalized", invoice)
}

/**
 * Charges the customer's card for an open invoice and says so by events.
 *
 * @param confirmed the cardholder is present and has approved
 * @returns the reason when the card refused, nothing when the invoice is paid
 */
export function collect(fake: Fake, invoice: Invoice, confirmed = false): ApiError | undefined {
  const customer = fake.get("customer", idOf(invoice.customer)!)
  if (invoice.status === "paid") throw invalid("Invoice is already paid", undefined, "invoice_already_paid")
  if (invoice.status !== "open") throw invalid("This invoice cannot be paid.", undefined, "invoice_not_open")
  const declined = invoice.amount_due > 0 ? chargeError(fake, invoice, confirmed) : undefined
  invoice.attempted = true
  if (invoice.amount_due > 0) invoice.attempt_count += 1
  if (!declined) {
    markPaid(fake, invoice)
    return undefined
  }
  customer.delinquent = true
  if (declined.body.code === "authentication_required") fake.emit("invoice.payment_action_required", invoice)
  fake.emit("invoice.payment_failed", invoice)
  return declined
}

export function voidInvoice(fake: Fake, invoice: Invoice): void {
  if (invoice.status !== "open")
    throw invalid("You can only void open invoices.", undefined, "invoice_not_open")
  invoice.status = "void"
  invoice.next_payment_attempt = null
  invoice.status_transitions.voided_at = fake.now(idOf(invoice.customer))
  fake.emit("invoice.voided", invoice)
}

/** The card that would be charged: the subscription's own, else the customer's. */
export function cardFor(fake: Fake, invoice: Invoice): string | null {
  const subscription = subscriptionOf(fake, invoice)
  const customer = fake.get("customer", idOf(invoice.customer)!)
  return (
    idOf(subscription?.default_payment_method ?? null) ??
    idOf(customer.invoice_settings.default_payment_method)
  )
}

export function subscriptionOf(fake: Fake, invoice: Invoice): Objects["subscription"] | undefined {
  const id = idOf(invoice.parent?.subscription_details?.subscription ?? null)
  return id ? fake.state.objects.subscription[id] : undefined
}

function chargeError(fake: Fake, invoice: Invoice, confirmed: boolean): ApiError | undefined {
  const customer = idOf(invoice.customer)
  const renewal = invoice.billing_reason === "subscription_cycle"
  if (renewal && !confirmed && takeFault(fake.state, ["decline_renewal"], { customer })) {
    return refusal("declines", false)
  }
  const card = cardFor(fake, invoice)
  if (!card) {
    return new ApiError(400, {
      type: "invalid_request_error",
      code: "resource_missing",
      message: "This customer has no attached payment source or default payment method.",
    })
  }
  return refusal(fake.state.cards[card]!, confirmed)
}

function markPaid(fake: Fake, invoice: Invoice): void {
  const customer = fake.get("customer", idOf(invoice.customer)!)
  invoice.status = "paid"
  invoice.amount_paid = invoice.amount_due
  invoice.amount_remaining = 0
  invoice.next_payment_attempt = null
  invoice.status_transitions.paid_at = fake.now(customer.id)
  customer.delinquent = false
  fake.emit("invoice.paid", invoice)
  fake.emit("invoice.payment_succeeded", invoice)
}
