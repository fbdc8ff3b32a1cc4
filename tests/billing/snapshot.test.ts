import type Stripe from "stripe"
import { beforeAll, describe, expect, it } from "vitest"
import { invoiceSnapshot, isOurs, subscriptionSnapshot } from "@/lib/billing/snapshot"
import { customerWithCard, givenSubject, monthlyPrice } from "../fakes/stripe/subject"

const subject = givenSubject()
let subscription: Stripe.Subscription
let invoice: Stripe.Invoice

beforeAll(async () => {
  const { stripe } = subject
  const customer = await customerWithCard(stripe, "pm_card_visa")
  const price = await monthlyPrice(stripe, 2900, { metadata: { plan: "storefront" } })
  subscription = await stripe.subscriptions.create({ customer: customer.id, items: [{ price: price.id }] })
  invoice = await stripe.invoices.retrieve(subscription.latest_invoice as string)
})

/** The object as JSON brings it, without the field at `path`. */
function without<T extends object>(object: T, path: string): T {
  const copy = JSON.parse(JSON.stringify(object))
  const parts = path.split(".")
  const last = parts.pop()!
  delete parts.reduce((at, part) => at[part], copy)[last]
  return copy
}

describe("what we read of a subscription", () => {
  it("is the plan by the price's own mark and the period by the item", () => {
    const item = subscription.items.data[0]!
    expect(subscriptionSnapshot(subscription)).toEqual({
      id: subscription.id,
      customer: subscription.customer,
      plan: "storefront",
      status: "active",
      created: new Date(subscription.created * 1000),
      billing_cycle_anchor: new Date(subscription.billing_cycle_anchor * 1000),
      current_period_start: new Date(item.current_period_start * 1000),
      current_period_end: new Date(item.current_period_end * 1000),
      cancel_at_period_end: false,
      scheduled_plan: null,
    })
  })

  // Fields move between versions of the API, and a silent undefined would become a wrong quota (PLATFORM 3.19).
  it.each([
    "status",
    "customer",
    "billing_cycle_anchor",
    "cancel_at_period_end",
    "schedule",
    "items.data.0.current_period_start",
    "items.data.0.current_period_end",
  ])("fails loudly without %s", (path) => {
    expect(() => subscriptionSnapshot(without(subscription, path))).toThrow(path)
  })

  it("fails on a subscription of something else, which is not ours", () => {
    const foreign = without(subscription, "items.data.0.price.metadata.plan")
    expect(isOurs(subscription)).toBe(true)
    expect(isOurs(foreign)).toBe(false)
    expect(() => subscriptionSnapshot(foreign)).toThrow("no price of a plan")
  })

  it("takes a status that Stripe adds later as it is", () => {
    expect(subscriptionSnapshot({ ...subscription, status: "resting" }).status).toBe("resting")
  })
})

describe("what we read of an invoice", () => {
  it("names its subscription through its parent", () => {
    expect(invoiceSnapshot(invoice)).toMatchObject({
      id: invoice.id,
      subscription: subscription.id,
      status: "paid",
      amount_minor: 2900,
      currency: "usd",
      hosted_url: invoice.hosted_invoice_url,
    })
  })

  it.each(["status", "total", "currency", "parent", "status_transitions"])(
    "fails loudly without %s",
    (path) => {
      expect(() => invoiceSnapshot(without(invoice, path))).toThrow(path)
    },
  )
})
