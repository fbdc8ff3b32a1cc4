import { randomUUID } from "node:crypto"
import Stripe from "stripe"
import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest"
import { asWorker, closePools, withTenant } from "@/db"
import { reviewSubscriptions, showBilling, startCheckout } from "@/lib/billing"
import { createEndpoint } from "@/lib/webhooks"
import { control, customerWithCard } from "../fakes/stripe/subject"
import { waitForMail } from "../support/mailbox"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber, type Subscriber, standInClient, until, visit } from "../support/subscriber"

beforeAll(takeSettings)
afterAll(closePools)

const DAY_S = 86_400
const fake = () => ({ url: stack().stripeFakeUrl })
const billingOf = (subscriber: Subscriber) => showBilling({ ctx: subscriber.as("owner") })

afterEach(async () => {
  await control(fake(), "DELETE", "faults")
  await control(fake(), "POST", "settings", { after_dunning: "canceled" })
})

/** Waits until every event that was sent is taken in and worked off. */
async function allWorkedOff(): Promise<void> {
  expect(await control(fake(), "POST", "settle")).toEqual({ idle: true })
  await until(async () => {
    const { waiting } = await asWorker((trx) =>
      trx
        .selectFrom("stripe_event")
        .select((select) => select.fn.countAll<number>().as("waiting"))
        .where("processed_at", "is", null)
        .executeTakeFirstOrThrow(),
    )
    return waiting === 0
  })
}

async function pay(subscriber: Subscriber, plan: "storefront" | "brand" = "storefront"): Promise<string> {
  const { url } = await startCheckout({ ctx: subscriber.as("owner"), input: { plan } })
  expect((await visit(url, { card: "pays" })).status).toBe(303)
  return customerOf(subscriber)
}

async function customerOf(subscriber: Subscriber): Promise<string> {
  const { stripe_customer_id } = await withTenant(subscriber.ctx.account_id, (trx) =>
    trx.selectFrom("account").select("stripe_customer_id").executeTakeFirstOrThrow(),
  )
  return stripe_customer_id!
}

async function onlySubscription(customer: string): Promise<string> {
  const { data } = await standInClient().subscriptions.list({ customer, status: "all" })
  expect(data).toHaveLength(1)
  return data[0]!.id
}

describe("the webhook", () => {
  const secret = () => stack().settings.STRIPE_WEBHOOK_SECRET

  async function deliver(
    body: string,
    signed: { timestamp?: number; secret?: string; payload?: string } | null,
  ): Promise<{ status: number; outcome: string }> {
    const header =
      signed &&
      new Stripe("sk_test_unused").webhooks.generateTestHeaderString({
        payload: signed.payload ?? body,
        secret: signed.secret ?? secret(),
        timestamp: signed.timestamp ?? Math.floor(Date.now() / 1000),
      })
    const answer = await fetch(`${stack().appUrl}/api/stripe/webhook`, {
      method: "POST",
      body,
      headers: { "content-type": "application/json", ...(header && { "stripe-signature": header }) },
    })
    return { status: answer.status, ...((await answer.json()) as { outcome: string }) }
  }

  function eventOf(type: string, id = `evt_${randomUUID().replaceAll("-", "")}`) {
    const created = Math.floor(Date.now() / 1000)
    const object = { id: "sub_1", object: "subscription", customer: "cus_nobody" }
    return { id, body: JSON.stringify({ id, object: "event", type, created, data: { object } }, null, 2) }
  }

  async function stored(id: string) {
    return asWorker((trx) =>
      trx.selectFrom("stripe_event").selectAll().where("id", "=", id).executeTakeFirst(),
    )
  }

  it("takes an event once and knows it again", async () => {
    const { id, body } = eventOf("customer.subscription.updated")
    expect(await deliver(body, {})).toEqual({ status: 200, outcome: "accepted" })
    expect(await deliver(body, {})).toEqual({ status: 200, outcome: "known" })
    expect((await stored(id))?.payload).toEqual({ customer: "cus_nobody", created: expect.any(Number) })
    await until(async () => (await stored(id))?.processed_at !== null)
  })

  it("answers 200 to a type that it does not know, and keeps it", async () => {
    const { id, body } = eventOf("terminal.reader.action_failed")
    expect(await deliver(body, {})).toEqual({ status: 200, outcome: "ignored" })
    expect((await stored(id))?.processed_at).not.toBeNull()
  })

  it.each([
    ["without a signature", () => null],
    ["signed with another secret", () => ({ secret: "whsec_other" })],
    ["signed 301 seconds ago", () => ({ timestamp: Math.floor(Date.now() / 1000) - 301 })],
    ["signed a day in the future", () => ({ timestamp: Math.floor(Date.now() / 1000) + DAY_S })],
    ["whose body was written anew", () => ({ payload: "{}" })],
  ])("refuses an event %s with 400 and keeps nothing", async (_, signed) => {
    const { id, body } = eventOf("customer.subscription.updated")
    expect(await deliver(body, signed())).toEqual({ status: 400, outcome: "refused" })
    expect(await stored(id)).toBeUndefined()
  })

  it("refuses what is larger than any event", async () => {
    const answer = await deliver("x".repeat(1024 * 1024 + 1), {})
    expect(answer).toEqual({ status: 413, outcome: "too_large" })
  })
})

describe("whatever happens to the events, the end is the same", () => {
  const upset: [string, object[]][] = [
    ["in order", []],
    ["each three times", [{ kind: "webhook_duplicate", copies: 2, times: 50 }]],
    ["backwards", [{ kind: "webhook_reorder", times: 6 }]],
    ["lost at first", [{ kind: "webhook_drop", times: 50 }]],
    ["badly signed at first", [{ kind: "webhook_bad_signature", times: 50 }]],
    ["dated a day ahead at first", [{ kind: "webhook_future", times: 50 }]],
  ]

  it.each(upset)("%s", async (_, faults) => {
    const subscriber = await createSubscriber()
    for (const fault of faults) await control(fake(), "POST", "faults", fault)
    const customer = await pay(subscriber)
    await standInClient().subscriptions.update(await onlySubscription(customer), {
      cancel_at_period_end: true,
    })
    await control(fake(), "DELETE", "faults")
    await allWorkedOff()
    expect(await billingOf(subscriber)).toMatchObject({
      plan: "storefront",
      unit_cap: 50_000,
      subscription: { status: "active", cancel_at_period_end: true },
    })
  })

  it("an old event that comes after the end does not bring the plan back", async () => {
    const subscriber = await createSubscriber()
    const stripe = standInClient()
    const customer = await pay(subscriber)
    await allWorkedOff()
    await stripe.subscriptions.cancel(await onlySubscription(customer))
    await until(async () => (await billingOf(subscriber)).plan === "nano")
    const { data } = await stripe.events.list({ type: "customer.subscription.created", limit: 100 })
    const old = data.find((event) => (event.data.object as { customer?: string }).customer === customer)!
    // Taken in anew, as by a process whose database was restored from before the event.
    await asWorker((trx) => trx.deleteFrom("stripe_event").where("id", "=", old.id).execute())
    await control(fake(), "POST", "deliveries", { event: old.id })
    await allWorkedOff()
    expect(await billingOf(subscriber)).toMatchObject({ plan: "nano", unit_cap: 1000, subscription: null })
  })

  it("the end of an old subscription does not touch the one that came after it", async () => {
    const subscriber = await createSubscriber()
    const stripe = standInClient()
    const customer = await pay(subscriber)
    await stripe.subscriptions.cancel(await onlySubscription(customer))
    await until(async () => (await billingOf(subscriber)).plan === "nano")
    await pay(subscriber, "brand")
    await until(async () => (await billingOf(subscriber)).plan === "brand")
    const { data } = await stripe.events.list({ type: "customer.subscription.deleted", limit: 100 })
    const ended = data.find((event) => (event.data.object as { customer?: string }).customer === customer)!
    await asWorker((trx) => trx.deleteFrom("stripe_event").where("id", "=", ended.id).execute())
    await control(fake(), "POST", "deliveries", { event: ended.id })
    await allWorkedOff()
    expect(await billingOf(subscriber)).toMatchObject({ plan: "brand", unit_cap: 500_000 })
  })

  it("a fault of the payment service delays the work and loses none of it", async () => {
    const subscriber = await createSubscriber()
    const { url } = await startCheckout({ ctx: subscriber.as("owner"), input: { plan: "storefront" } })
    const path = "/v1/subscriptions"
    await control(fake(), "POST", "faults", {
      kind: "error_before",
      status: 500,
      method: "GET",
      path,
      times: 4,
    })
    await visit(url, { card: "pays" })
    await until(async () => (await billingOf(subscriber)).plan === "storefront", 40_000)
    expect(await control(fake(), "GET", "faults")).toEqual([])
  })
})

describe("the account's own systems", () => {
  it("hear of a change of the subscription once, whatever number of events tell us of it", async () => {
    const subscriber = await createSubscriber()
    const { account_id } = subscriber.ctx
    const url = "http://127.0.0.1:9/hook"
    await createEndpoint({ ctx: subscriber.as("owner"), input: { url, events: ["subscription.changed"] } })
    await control(fake(), "POST", "faults", { kind: "webhook_duplicate", copies: 1, times: 50 })
    const customer = await pay(subscriber)
    await allWorkedOff()
    await standInClient().subscriptions.update(await onlySubscription(customer), {
      cancel_at_period_end: true,
    })
    await allWorkedOff()
    const told = await asWorker((trx) =>
      trx
        .selectFrom("webhook_delivery")
        .select("payload")
        .where("account_id", "=", account_id)
        .orderBy("id")
        .execute(),
    )
    expect(told.map(({ payload }) => JSON.parse(payload).data)).toMatchObject([
      { plan: "storefront", status: "active", cancel_at_period_end: false },
      { plan: "storefront", status: "active", cancel_at_period_end: true },
    ])
  })
})

describe("a payment that is owed", () => {
  /** A subscriber whose subscription began in the past, by a clock of the stand-in that can be moved on. */
  async function subscriberOnClock(daysAgo: number) {
    const subscriber = await createSubscriber()
    const stripe = standInClient()
    const start = Math.floor(Date.now() / 1000) - daysAgo * DAY_S
    const clock = await stripe.testHelpers.testClocks.create({ frozen_time: start })
    const customer = await customerWithCard(stripe, "pm_card_visa", { test_clock: clock.id })
    await asWorker((trx) =>
      trx
        .updateTable("account")
        .set({ stripe_customer_id: customer.id })
        .where("id", "=", subscriber.ctx.account_id)
        .execute(),
    )
    await pay(subscriber)
    await until(async () => (await billingOf(subscriber)).plan === "storefront")
    const subscription = await stripe.subscriptions.retrieve(await onlySubscription(customer.id))
    const periodEnd = subscription.items.data[0]!.current_period_end
    const advance = async (to: number) => {
      await stripe.testHelpers.testClocks.advance(clock.id, { frozen_time: to })
      await until(async () => (await stripe.testHelpers.testClocks.retrieve(clock.id)).status === "ready")
    }
    return { subscriber, customer: customer.id, periodEnd, advance }
  }

  async function allow(subscriber: Subscriber, overage_cap_minor: number): Promise<void> {
    await asWorker((trx) =>
      trx
        .updateTable("account")
        .set({ overage_cap_minor })
        .where("id", "=", subscriber.ctx.account_id)
        .execute(),
    )
  }

  it("leaves everything as it was for a week, says so to the owner, and is forgotten when it is paid", async () => {
    // The renewal falls about two days ago.
    const { subscriber, customer, periodEnd, advance } = await subscriberOnClock(33)
    await allow(subscriber, 800)
    await control(fake(), "POST", "faults", { kind: "decline_renewal", customer, times: 1 })
    await advance(periodEnd + 2 * 3600)
    const owing = await until(async () => {
      const billing = await billingOf(subscriber)
      return billing.subscription?.owed ? billing : undefined
    })
    expect(owing).toMatchObject({
      plan: "storefront",
      unit_cap: 60_000,
      subscription: { status: "past_due" },
    })
    const mail = await waitForMail(subscriber.email, "did not go through")
    expect(mail.text).toContain(`/portal/${subscriber.slug}/billing`)
    const { data } = await standInClient().invoices.list({ customer, status: "open" })
    await standInClient().invoices.pay(data[0]!.id)
    await until(async () => (await billingOf(subscriber)).subscription?.status === "active")
    expect((await billingOf(subscriber)).subscription?.owed).toBeNull()
  })

  it("costs the overage after a week, by the clock alone", async () => {
    const { subscriber, customer, periodEnd, advance } = await subscriberOnClock(33)
    await allow(subscriber, 800)
    await control(fake(), "POST", "faults", { kind: "decline_renewal", customer, times: 1 })
    await advance(periodEnd + 2 * 3600)
    const owed = await until(async () => (await billingOf(subscriber)).subscription?.owed ?? undefined)
    await reviewSubscriptions({ now: new Date(owed.full_until.getTime() - 1000) })
    expect((await billingOf(subscriber)).unit_cap).toBe(60_000)
    await reviewSubscriptions({ now: owed.full_until })
    expect((await billingOf(subscriber)).unit_cap).toBe(50_000)
  })

  it("ends the plan when no attempt succeeds", async () => {
    const { subscriber, customer, periodEnd, advance } = await subscriberOnClock(50)
    await control(fake(), "POST", "faults", { kind: "decline_renewal", customer, times: 10 })
    await advance(periodEnd + 17 * DAY_S)
    await until(async () => (await billingOf(subscriber)).plan === "nano")
    expect(await billingOf(subscriber)).toMatchObject({ unit_cap: 1000, subscription: null })
  })

  it("stops live calls where an unpaid subscription is kept", async () => {
    const { subscriber, customer, periodEnd, advance } = await subscriberOnClock(50)
    await control(fake(), "POST", "settings", { after_dunning: "unpaid" })
    await control(fake(), "POST", "faults", { kind: "decline_renewal", customer, times: 10 })
    await advance(periodEnd + 17 * DAY_S)
    await until(async () => (await billingOf(subscriber)).subscription?.status === "unpaid")
    expect(await billingOf(subscriber)).toMatchObject({ plan: "storefront", unit_cap: 0 })
  })
})
