import type Stripe from "stripe"
import { describe, expect, test } from "vitest"
import { advanceClock, control, customerWithCard, givenSubject, isStandIn, monthlyPrice } from "./subject"

const DAY_S = 86_400
const HOUR_S = 3600
const subject = givenSubject()

/** 31 January 2026, 10:00 UTC: the day that no February has. */
const START = Date.UTC(2026, 0, 31, 10) / 1000

async function subscriberOnClock(token = "pm_card_visa") {
  const { stripe } = subject
  const clock = await stripe.testHelpers.testClocks.create({ frozen_time: START })
  const customer = await customerWithCard(stripe, token, { test_clock: clock.id })
  const price = await monthlyPrice(stripe, 2900)
  const made = await stripe.subscriptions.create({ customer: customer.id, items: [{ price: price.id }] })
  return {
    customer: customer.id,
    id: made.id,
    read: () => stripe.subscriptions.retrieve(made.id),
    advance: (to: number) => advanceClock(stripe, clock.id, to),
    invoices: async () => (await stripe.invoices.list({ customer: customer.id })).data,
  }
}

function period(subscription: Stripe.Subscription): [string, string] {
  const { current_period_start: start, current_period_end: end } = subscription.items.data[0]!
  return [new Date(start * 1000).toISOString(), new Date(end * 1000).toISOString()]
}

describe("a renewal", () => {
  test("comes on the day of the month, the last one where the month is too short", async () => {
    const { advance, read } = await subscriberOnClock()
    expect(period(await read())).toEqual(["2026-01-31T10:00:00.000Z", "2026-02-28T10:00:00.000Z"])
    await advance(Date.UTC(2026, 2, 1) / 1000)
    expect(period(await read())).toEqual(["2026-02-28T10:00:00.000Z", "2026-03-31T10:00:00.000Z"])
  })

  test("is a draft for an hour and then charged", async () => {
    const { advance, invoices, read } = await subscriberOnClock()
    const renewal = Date.UTC(2026, 1, 28, 10) / 1000
    await advance(renewal + 60)
    expect((await invoices())[0]).toMatchObject({
      status: "draft",
      billing_reason: "subscription_cycle",
      total: 2900,
    })
    await advance(renewal + HOUR_S + 60)
    expect((await invoices())[0]).toMatchObject({ status: "paid", amount_paid: 2900 })
    expect((await read()).status).toBe("active")
  })

  test("is previewed before it comes", async () => {
    const { customer, id } = await subscriberOnClock()
    const preview = await subject.stripe.invoices.createPreview({ customer, subscription: id })
    expect(preview).toMatchObject({ total: 2900, period_end: Date.UTC(2026, 1, 28, 10) / 1000 })
  })

  test("does not come when the subscription was to end", async () => {
    const { advance, id, invoices, read } = await subscriberOnClock()
    await subject.stripe.subscriptions.update(id, { cancel_at_period_end: true })
    await advance(Date.UTC(2026, 2, 1) / 1000)
    expect(await read()).toMatchObject({ status: "canceled", ended_at: Date.UTC(2026, 1, 28, 10) / 1000 })
    expect(await invoices()).toHaveLength(1)
  })

  test("cannot be skipped by moving a clock more than two periods", async () => {
    const { advance } = await subscriberOnClock()
    await expect(advance(START + 100 * DAY_S)).rejects.toMatchObject({ param: "frozen_time" })
  })
})

describe("a schedule", () => {
  async function scheduled() {
    const subscriber = await subscriberOnClock()
    const { stripe } = subject
    const smaller = await monthlyPrice(stripe, 900)
    const made = await stripe.subscriptionSchedules.create({ from_subscription: subscriber.id })
    const phase = made.phases[0]!
    await stripe.subscriptionSchedules.update(made.id, {
      end_behavior: "release",
      phases: [
        {
          items: [{ price: phase.items[0]!.price as string }],
          start_date: phase.start_date,
          end_date: phase.end_date,
        },
        { items: [{ price: smaller.id }], duration: { interval: "month" }, metadata: { plan: "small" } },
      ],
    })
    return { ...subscriber, smaller: smaller.id, schedule: made.id }
  }

  test("changes the price with the next period, then lets go", async () => {
    const { advance, id, invoices, read, schedule, smaller } = await scheduled()
    const expanded = await subject.stripe.subscriptions.retrieve(id, { expand: ["schedule"] })
    expect(expanded.schedule).toMatchObject({
      id: schedule,
      status: "active",
      phases: [{}, { metadata: { plan: "small" } }],
    })
    expect(expanded.items.data[0]!.price.unit_amount).toBe(2900)
    await advance(Date.UTC(2026, 1, 28, 12) / 1000)
    expect((await read()).items.data).toMatchObject([{ price: { id: smaller } }])
    expect((await invoices())[0]).toMatchObject({ status: "paid", total: 900 })
    await advance(Date.UTC(2026, 2, 31, 12) / 1000)
    expect(await read()).toMatchObject({ schedule: null, items: { data: [{ price: { id: smaller } }] } })
    const { status } = await subject.stripe.subscriptionSchedules.retrieve(schedule)
    expect(status).toBe("released")
  })

  test("that is released changes nothing", async () => {
    const { advance, invoices, read, schedule } = await scheduled()
    await subject.stripe.subscriptionSchedules.release(schedule)
    expect((await read()).schedule).toBeNull()
    await advance(Date.UTC(2026, 1, 28, 12) / 1000)
    expect((await invoices())[0]).toMatchObject({ total: 2900 })
  })

  test("is one to a subscription", async () => {
    const { id } = await scheduled()
    const second = subject.stripe.subscriptionSchedules.create({ from_subscription: id })
    await expect(second).rejects.toMatchObject({ param: "from_subscription" })
  })
})

describe.runIf(isStandIn)("a renewal that the card refuses", () => {
  const renewal = Date.UTC(2026, 1, 28, 10) / 1000
  const declined = async (times: number) => {
    const subscriber = await subscriberOnClock()
    const { customer } = subscriber
    await control(subject, "POST", "faults", { kind: "decline_renewal", customer, times })
    await subscriber.advance(renewal + 2 * HOUR_S)
    return subscriber
  }

  test("is tried again after three days, and all is well when it goes through", async () => {
    const { advance, invoices, read } = await declined(1)
    expect((await read()).status).toBe("past_due")
    const [open] = await invoices()
    expect(open).toMatchObject({
      status: "open",
      attempt_count: 1,
      next_payment_attempt: renewal + HOUR_S + 3 * DAY_S,
    })
    await advance(renewal + 4 * DAY_S)
    expect((await read()).status).toBe("active")
    expect((await invoices())[0]).toMatchObject({ status: "paid", attempt_count: 2 })
  })

  test.each(["canceled", "unpaid", "past_due"] as const)(
    "leaves it %s after the last attempt",
    async (after) => {
      await control(subject, "POST", "settings", { after_dunning: after })
      const { advance, invoices, read } = await declined(4)
      await advance(renewal + 16 * DAY_S)
      expect((await read()).status).toBe(after)
      expect((await invoices())[0]).toMatchObject({
        status: "open",
        attempt_count: 4,
        next_payment_attempt: null,
      })
    },
  )

  test("is mended by paying the open invoice", async () => {
    const { customer, invoices, read } = await declined(1)
    const [open] = await invoices()
    expect(await subject.stripe.invoices.pay(open!.id)).toMatchObject({ status: "paid" })
    expect((await read()).status).toBe("active")
    expect(await subject.stripe.customers.retrieve(customer)).toMatchObject({ delinquent: false })
  })
})

describe.runIf(isStandIn)("a card that asks its owner", () => {
  test("cannot renew by itself", async () => {
    const { stripe } = subject
    const { advance, customer, id, read } = await subscriberOnClock()
    const asking = await stripe.paymentMethods.attach("pm_card_authenticationRequired", { customer })
    await stripe.subscriptions.update(id, { default_payment_method: asking.id })
    await advance(Date.UTC(2026, 2, 1) / 1000)
    expect((await read()).status).toBe("past_due")
    const { data } = await stripe.events.list({ type: "invoice.payment_action_required" })
    expect(data.map((event) => (event.data.object as Stripe.Invoice).customer)).toContain(customer)
  })
})
