import { randomUUID } from "node:crypto"
import Stripe from "stripe"
import { beforeAll, describe, expect, test } from "vitest"
import { advanceClock, customerWithCard, givenSubject } from "./subject"

const HOUR_S = 3600
const subject = givenSubject()
let meter: Stripe.Billing.Meter

beforeAll(async () => {
  meter = await subject.stripe.billing.meters.create({
    display_name: "Units",
    event_name: `units_${randomUUID().slice(0, 8)}`,
    default_aggregation: { formula: "sum" },
    event_time_window: "hour",
    customer_mapping: { type: "by_id", event_payload_key: "stripe_customer_id" },
    value_settings: { event_payload_key: "units" },
  })
})

function reading(customer: string, value: number, timestamp: number, identifier = randomUUID()) {
  return {
    event_name: meter.event_name,
    identifier,
    timestamp,
    payload: { stripe_customer_id: customer, units: String(value) },
  } satisfies Stripe.Billing.MeterEventCreateParams
}

function fullHour(hoursAgo: number): number {
  return Math.floor(Date.now() / 1000 / HOUR_S) * HOUR_S - hoursAgo * HOUR_S
}

async function summaries(customer: string, from: number, to: number) {
  const { data } = await subject.stripe.billing.meters.listEventSummaries(meter.id, {
    customer,
    start_time: from,
    end_time: to,
    value_grouping_window: "hour",
  })
  return data
}

describe("an hourly meter", () => {
  test("keeps the newest total of an hour and adds the hours up", async () => {
    const { stripe } = subject
    const { id } = await stripe.customers.create({})
    const [earlier, later] = [fullHour(3), fullHour(2)]
    await stripe.billing.meterEvents.create(reading(id, 10, earlier))
    await stripe.billing.meterEvents.create(reading(id, 25, earlier + 1))
    await stripe.billing.meterEvents.create(reading(id, 7, later))
    const found = await summaries(id, earlier, fullHour(0))
    expect(found.map((one) => [one.start_time, one.aggregated_value])).toEqual([
      [later, 7],
      [earlier, 25],
    ])
  })

  test("takes the newest total even when an older one arrives after it", async () => {
    const { stripe } = subject
    const { id } = await stripe.customers.create({})
    const hour = fullHour(3)
    await stripe.billing.meterEvents.create(reading(id, 25, hour + 2))
    await stripe.billing.meterEvents.create(reading(id, 10, hour + 1))
    expect(await summaries(id, hour, hour + HOUR_S)).toMatchObject([{ aggregated_value: 25 }])
  })

  test("refuses a repeated identifier without asking for another try", async () => {
    const { stripe } = subject
    const { id } = await stripe.customers.create({})
    const twice = reading(id, 5, fullHour(2))
    await stripe.billing.meterEvents.create(twice)
    const error = await stripe.billing.meterEvents
      .create(twice, { idempotencyKey: randomUUID() })
      .catch((e) => e)
    expect(error).toBeInstanceOf(Stripe.errors.StripeInvalidRequestError)
    expect(error.headers["stripe-should-retry"]).toBe("false")
    expect(await summaries(id, fullHour(2), fullHour(1))).toMatchObject([{ aggregated_value: 5 }])
  })

  test("refuses what is too old or from the future", async () => {
    const { stripe } = subject
    const { id } = await stripe.customers.create({})
    const now = Math.floor(Date.now() / 1000)
    const old = stripe.billing.meterEvents.create(reading(id, 1, now - 36 * 86_400))
    await expect(old).rejects.toMatchObject({ param: "timestamp" })
    const ahead = stripe.billing.meterEvents.create(reading(id, 1, now + 600))
    await expect(ahead).rejects.toMatchObject({ param: "timestamp" })
  })

  test("a cancelled reading no longer counts", async () => {
    const { stripe } = subject
    const { id } = await stripe.customers.create({})
    const mistaken = reading(id, 9, fullHour(2))
    await stripe.billing.meterEvents.create(mistaken)
    await stripe.billing.meterEventAdjustments.create({
      event_name: meter.event_name,
      type: "cancel",
      cancel: { identifier: mistaken.identifier },
    })
    expect(await summaries(id, fullHour(2), fullHour(1))).toEqual([])
  })

  test("version 2 of the API takes the same reading as JSON", async () => {
    const { stripe } = subject
    const { id } = await stripe.customers.create({})
    const sent = await stripe.v2.billing.meterEvents.create({
      event_name: meter.event_name,
      payload: { stripe_customer_id: id, units: "12" },
      timestamp: new Date(fullHour(2) * 1000).toISOString(),
    })
    expect(sent.object).toBe("v2.billing.meter_event")
    expect(await summaries(id, fullHour(2), fullHour(1))).toMatchObject([{ aggregated_value: 12 }])
  })
})

describe("a metered price", () => {
  test("bills nothing at the start and the graduated use at renewal", async () => {
    const { stripe } = subject
    const start = Math.floor(Date.now() / 1000) - 20 * 86_400
    const clock = await stripe.testHelpers.testClocks.create({ frozen_time: start })
    const customer = await customerWithCard(stripe, "pm_card_visa", { test_clock: clock.id })
    const product = await stripe.products.create({ name: "Use" })
    const price = await stripe.prices.create({
      currency: "usd",
      product: product.id,
      billing_scheme: "tiered",
      tiers_mode: "graduated",
      recurring: { interval: "month", usage_type: "metered", meter: meter.id },
      tiers: [
        { up_to: 1000, unit_amount: 0 },
        { up_to: "inf", unit_amount_decimal: Stripe.Decimal.from("0.5") },
      ],
    })
    const made = await stripe.subscriptions.create({
      customer: customer.id,
      items: [{ price: price.id }],
      expand: ["latest_invoice"],
    })
    expect((made.latest_invoice as Stripe.Invoice).total).toBe(0)
    await stripe.billing.meterEvents.create(reading(customer.id, 3001, start + 86_400))
    const end = made.items.data[0]!.current_period_end
    await advanceClock(stripe, clock.id, end + 2 * HOUR_S)
    const [renewal] = (await stripe.invoices.list({ customer: customer.id, limit: 1 })).data
    // 2,001 units beyond the first 1,000, half a cent each: 10.005, rounded half up to 10.01 US dollars.
    expect(renewal).toMatchObject({ status: "paid", billing_reason: "subscription_cycle", total: 1001 })
  })
})
