import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools } from "@/db"
import { changePlan, keepPlan, previewPlanChange, showBilling, startCheckout } from "@/lib/billing"
import { advanceClock, customerWithCard } from "../fakes/stripe/subject"
import { takeSettings } from "../support/stack"
import { createSubscriber, type Subscriber, standInClient, until, visit } from "../support/subscriber"

beforeAll(takeSettings)
afterAll(closePools)

const DAY_S = 86_400
const billingOf = (subscriber: Subscriber) => showBilling({ ctx: subscriber.as("owner") })

/** A subscriber whose period began some days ago, by a clock of the stand-in. */
async function subscribed(plan: "storefront" | "brand", daysAgo = 10) {
  const subscriber = await createSubscriber()
  const stripe = standInClient()
  const frozen_time = Math.floor(Date.now() / 1000) - daysAgo * DAY_S
  const { id: clock } = await stripe.testHelpers.testClocks.create({ frozen_time })
  const { id: customer } = await customerWithCard(stripe, "pm_card_visa", { test_clock: clock })
  await asWorker((trx) =>
    trx
      .updateTable("account")
      .set({ stripe_customer_id: customer })
      .where("id", "=", subscriber.ctx.account_id)
      .execute(),
  )
  await visit((await startCheckout({ ctx: subscriber.as("owner"), input: { plan } })).url, { card: "pays" })
  const { subscription } = await until(async () => {
    const billing = await billingOf(subscriber)
    return billing.plan === plan && billing
  })
  return {
    subscriber,
    customer,
    clock,
    start: subscription!.current_period_start,
    end: subscription!.current_period_end,
  }
}

describe("a larger plan", () => {
  it("is paid for the rest of the period, as its preview said, and in force at once", async () => {
    const { subscriber, customer, clock, start, end } = await subscribed("storefront")
    const half = Math.floor((start.getTime() + end.getTime()) / 2000)
    await advanceClock(standInClient(), clock, half)
    const ctx = subscriber.as("owner")
    const preview = await previewPlanChange({ ctx, input: { plan: "brand", proration_date: half } })
    // Half a month of the difference of 189 and 29 US dollars.
    expect(preview).toEqual({ kind: "larger", due_minor: 8000, currency: "usd", proration_date: half })
    const changed = await changePlan({ ctx, input: { plan: "brand", proration_date: half } })
    expect(changed).toEqual({ outcome: "changed" })
    const billing = await until(async () => {
      const now = await billingOf(subscriber)
      return now.plan === "brand" && now
    })
    expect(billing.unit_cap).toBe(500_000)
    // The period, and with it the counter, is the same as before.
    expect(billing.subscription).toMatchObject({ current_period_start: start, current_period_end: end })
    const { data } = await standInClient().invoices.list({ customer, limit: 1 })
    expect(data[0]).toMatchObject({ status: "paid", total: 8000 })
  })

  it("waits for its payment when the card refuses, and comes when the invoice is paid", async () => {
    const { subscriber, customer } = await subscribed("storefront")
    const stripe = standInClient()
    const subscription = (await stripe.subscriptions.list({ customer })).data[0]!
    const failing = await stripe.paymentMethods.attach("pm_card_chargeCustomerFail", { customer })
    await stripe.subscriptions.update(subscription.id, { default_payment_method: failing.id })
    const answer = await changePlan({ ctx: subscriber.as("owner"), input: { plan: "brand" } })
    expect(answer).toMatchObject({ outcome: "payment_needed", url: expect.stringContaining("/invoice/") })
    expect(await billingOf(subscriber)).toMatchObject({ plan: "storefront", unit_cap: 50_000 })
    const good = await stripe.paymentMethods.attach("pm_card_visa", { customer })
    await stripe.subscriptions.update(subscription.id, { default_payment_method: good.id })
    const { url } = answer as { url: string }
    expect((await visit(url, {})).status).toBe(303)
    await until(async () => (await billingOf(subscriber)).plan === "brand")
  })
})

describe("a smaller plan", () => {
  it("comes with the next period and not before", async () => {
    const { subscriber, clock, end } = await subscribed("brand", 40)
    const ctx = subscriber.as("owner")
    expect(await previewPlanChange({ ctx, input: { plan: "storefront" } })).toEqual({
      kind: "smaller",
      at: end,
    })
    const asked = await changePlan({ ctx, input: { plan: "storefront" } })
    expect(asked).toEqual({ outcome: "scheduled", at: end })
    await until(async () => (await billingOf(subscriber)).subscription?.scheduled_plan === "storefront")
    expect(await billingOf(subscriber)).toMatchObject({ plan: "brand", unit_cap: 500_000 })
    await advanceClock(standInClient(), clock, end.getTime() / 1000 + 2 * 3600)
    await until(async () => (await billingOf(subscriber)).plan === "storefront")
    const billing = await billingOf(subscriber)
    expect(billing).toMatchObject({ unit_cap: 50_000, subscription: { scheduled_plan: null } })
  })

  it("can be taken back", async () => {
    const { subscriber } = await subscribed("brand")
    const ctx = subscriber.as("owner")
    await changePlan({ ctx, input: { plan: "storefront" } })
    await until(async () => (await billingOf(subscriber)).subscription?.scheduled_plan === "storefront")
    await keepPlan({ ctx })
    await until(async () => (await billingOf(subscriber)).subscription?.scheduled_plan === null)
    expect((await billingOf(subscriber)).plan).toBe("brand")
  })
})

describe("a change of plan is refused", () => {
  it("to anyone but an owner", async () => {
    const subscriber = await createSubscriber()
    for (const role of ["developer", "merchandiser", "viewer"] as const) {
      const asked = changePlan({ ctx: subscriber.as(role), input: { plan: "brand" } })
      await expect(asked).rejects.toMatchObject({ code: "forbidden" })
      await expect(keepPlan({ ctx: subscriber.as(role) })).rejects.toMatchObject({ code: "forbidden" })
    }
  })

  it("without a subscription, to the plan that it has, and while it is to end", async () => {
    const free = await createSubscriber()
    const none = changePlan({ ctx: free.as("owner"), input: { plan: "brand" } })
    await expect(none).rejects.toMatchObject({ code: "conflict" })
    const { subscriber, customer } = await subscribed("storefront")
    const same = changePlan({ ctx: subscriber.as("owner"), input: { plan: "storefront" } })
    await expect(same).rejects.toMatchObject({ code: "conflict" })
    const stripe = standInClient()
    const [running] = (await stripe.subscriptions.list({ customer })).data
    await stripe.subscriptions.update(running!.id, { cancel_at_period_end: true })
    await until(async () => (await billingOf(subscriber)).subscription?.cancel_at_period_end)
    const ending = changePlan({ ctx: subscriber.as("owner"), input: { plan: "brand" } })
    await expect(ending).rejects.toMatchObject({ code: "conflict" })
  })
})
