import request from "supertest"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { closePools, withTenant } from "@/db"
import { listInvoices, openBillingPortal, setSpendingCap, showBilling, startCheckout } from "@/lib/billing"
import { quotaOf } from "@/lib/usage"
import { control } from "../fakes/stripe/subject"
import { stack, takeSettings } from "../support/stack"
import { createSubscriber, type Subscriber, standInClient, until, visit } from "../support/subscriber"

beforeAll(takeSettings)
afterAll(closePools)

const fake = () => ({ url: stack().stripeFakeUrl })

/** Subscribes to a plan through the hosted checkout, as an owner clicks through it, and waits for it to be in force. */
async function subscribe(subscriber: Subscriber, plan: "storefront" | "brand" = "storefront"): Promise<void> {
  const { url } = await startCheckout({ ctx: subscriber.as("owner"), input: { plan } })
  const paid = await visit(url, { card: "pays" })
  expect(paid.status).toBe(303)
  await until(async () => (await showBilling({ ctx: subscriber.as("owner") })).plan === plan)
}

describe("point 7 of the skeleton: an owner pays for a plan", () => {
  it("goes from Nano through the checkout to Storefront, with the quota in force and the invoice listed", async () => {
    const subscriber = await createSubscriber()
    const ctx = subscriber.as("owner")
    expect(await showBilling({ ctx })).toMatchObject({ plan: "nano", unit_cap: 1000, subscription: null })

    const { url } = await startCheckout({ ctx, input: { plan: "storefront" } })
    const page = await visit(url)
    expect(page.text).toContain("Pay 29.00 USD")
    expect(page.text).toContain("Tarnwright Storefront")
    const paid = await visit(url, { card: "pays" })
    expect(paid.location).toBe(`${stack().appUrl}/portal/${subscriber.slug}/billing?checkout=done`)

    const billing = await until(async () => {
      const now = await showBilling({ ctx })
      return now.plan === "storefront" && now
    })
    expect(billing).toMatchObject({ unit_cap: 50_000, subscription: { status: "active", owed: null } })
    const quota = await quotaOf({ ctx, input: { mode: "live" } })
    expect(quota.cap).toBe(50_000)
    expect(quota.period_end).toEqual(billing.subscription?.current_period_end)

    const [invoice] = await until(async () => {
      const invoices = await listInvoices({ ctx })
      return invoices[0]?.status === "paid" && invoices
    })
    expect(invoice).toMatchObject({ amount_minor: 2900, currency: "usd" })
    expect((await visit(invoice!.hosted_url!)).text).toContain(invoice!.number)
  })

  it("lets a running process answer at once a key that its quota had stopped", async () => {
    const subscriber = await createSubscriber()
    const { secret } = await subscriber.key()
    const ask = () =>
      request(stack().appUrl)
        .post("/api/v1/carbonate/co2")
        .set("authorization", `Bearer ${secret}`)
        .send({ ph: 6.8, kh_dkh: 4 })
    await ask().expect(200)
    await withTenant(subscriber.ctx.account_id, (trx) =>
      trx.updateTable("account").set({ unit_cap: 1 }).where("id", "=", subscriber.ctx.account_id).execute(),
    )
    await until(async () => (await ask()).status === 402)
    await subscribe(subscriber)
    // The change is told to every process; a cache that had to run out would take half a minute.
    await until(async () => (await ask()).status === 200, 2000)
  })

  it("writes the change into the audit trail", async () => {
    const subscriber = await createSubscriber()
    await subscribe(subscriber, "brand")
    const acts = await withTenant(subscriber.ctx.account_id, (trx) =>
      trx.selectFrom("audit_log").select(["action", "actor_kind", "detail"]).orderBy("at").execute(),
    )
    expect(acts).toMatchObject([
      { action: "billing.checkout_started", actor_kind: "user" },
      {
        action: "subscription.changed",
        actor_kind: "system",
        detail: { plan_before: "nano", plan: "brand" },
      },
    ])
  })
})

describe("a checkout that does not end in a payment grants nothing", () => {
  async function checkout() {
    const subscriber = await createSubscriber()
    const { url } = await startCheckout({ ctx: subscriber.as("owner"), input: { plan: "storefront" } })
    return { subscriber, url }
  }

  async function expectNothing(subscriber: Subscriber): Promise<void> {
    await control(fake(), "POST", "settle")
    const { stripe_customer_id: customer } = await withTenant(subscriber.ctx.account_id, (trx) =>
      trx.selectFrom("account").select("stripe_customer_id").executeTakeFirstOrThrow(),
    )
    const { data } = await standInClient().subscriptions.list({ customer: customer!, status: "all" })
    expect(data).toEqual([])
    const ctx = subscriber.as("owner")
    expect(await showBilling({ ctx })).toMatchObject({ plan: "nano", unit_cap: 1000, subscription: null })
    expect(await listInvoices({ ctx })).toEqual([])
  }

  it.each([
    ["declines", "Your card was declined."],
    ["no_funds", "Your card has insufficient funds."],
  ])("when the card %s", async (card, words) => {
    const { subscriber, url } = await checkout()
    const answer = await visit(url, { card })
    expect(answer.status).toBe(200)
    expect(answer.text).toContain(words)
    await expectNothing(subscriber)
  })

  it("when the owner of the card refuses to confirm, and grants it when they approve", async () => {
    const { subscriber, url } = await checkout()
    expect((await visit(url, { card: "asks" })).text).toContain("Is this you?")
    const refused = await visit(`${url}/confirm`, { card: "asks", answer: "refuse" })
    expect(refused.text).toContain("Nothing was paid.")
    await expectNothing(subscriber)
    expect((await visit(`${url}/confirm`, { card: "asks", answer: "approve" })).status).toBe(303)
    await until(async () => (await showBilling({ ctx: subscriber.as("owner") })).plan === "storefront")
  })

  it("when a person leaves, or opens the address of success by hand", async () => {
    const { subscriber, url } = await checkout()
    const page = await visit(url)
    expect(page.text).toContain(`${stack().appUrl}/portal/${subscriber.slug}/billing?checkout=left`)
    await fetch(`${stack().appUrl}/portal/${subscriber.slug}/billing?checkout=done`)
    await expectNothing(subscriber)
  })

  it("when it is left open until another takes its place", async () => {
    const { subscriber, url } = await checkout()
    const { url: newer } = await startCheckout({ ctx: subscriber.as("owner"), input: { plan: "brand" } })
    expect((await visit(url, { card: "pays" })).text).toContain("This checkout has ended")
    await expectNothing(subscriber)
    await visit(newer, { card: "pays" })
    await until(async () => (await showBilling({ ctx: subscriber.as("owner") })).plan === "brand")
  })
})

describe("who may and what else is refused", () => {
  it("only an owner opens a checkout or the portal or sets the ceiling", async () => {
    const subscriber = await createSubscriber()
    for (const role of ["developer", "merchandiser", "viewer"] as const) {
      const ctx = subscriber.as(role)
      await expect(startCheckout({ ctx, input: { plan: "brand" } })).rejects.toMatchObject({
        code: "forbidden",
      })
      await expect(openBillingPortal({ ctx, input: {} })).rejects.toMatchObject({ code: "forbidden" })
      const ceiling = setSpendingCap({ ctx, input: { overage_cap_minor: 100 } })
      await expect(ceiling).rejects.toMatchObject({ code: "forbidden" })
    }
    expect(await listInvoices({ ctx: subscriber.as("viewer") })).toEqual([])
    expect(() => listInvoices({ ctx: subscriber.as("developer") })).toThrow("forbidden")
  })

  it("a second subscription beside one that runs", async () => {
    const subscriber = await createSubscriber()
    await subscribe(subscriber)
    const second = startCheckout({ ctx: subscriber.as("owner"), input: { plan: "brand" } })
    await expect(second).rejects.toMatchObject({ code: "conflict" })
  })

  it("says that the payment service does not answer, and works when it does again", async () => {
    const subscriber = await createSubscriber()
    const ctx = subscriber.as("owner")
    const fault = {
      kind: "error_before",
      status: 503,
      times: 3,
      path: "/v1/checkout/sessions",
      method: "POST",
    }
    await control(fake(), "POST", "faults", fault)
    const refused = startCheckout({ ctx, input: { plan: "storefront" } })
    await expect(refused).rejects.toMatchObject({ code: "unavailable", retryAfterS: 60 })
    expect((await startCheckout({ ctx, input: { plan: "storefront" } })).url).toContain("/checkout/")
  })
})

describe("the spending ceiling", () => {
  it("buys units beyond the plan at once, and none when it is taken back", async () => {
    const subscriber = await createSubscriber()
    await subscribe(subscriber)
    const ctx = subscriber.as("owner")
    // 8 US dollars at 0.80 per 1,000 units.
    expect(await setSpendingCap({ ctx, input: { overage_cap_minor: 800 } })).toEqual({ unit_cap: 60_000 })
    expect((await quotaOf({ ctx, input: { mode: "live" } })).cap).toBe(60_000)
    expect(await setSpendingCap({ ctx, input: { overage_cap_minor: 0 } })).toEqual({ unit_cap: 50_000 })
  })

  it("needs a paid plan and a sum in range", async () => {
    const subscriber = await createSubscriber()
    const ctx = subscriber.as("owner")
    const free = setSpendingCap({ ctx, input: { overage_cap_minor: 800 } })
    await expect(free).rejects.toMatchObject({ code: "plan_limit_reached" })
    for (const overage_cap_minor of [-1, 0.5, 1_000_001, Number.NaN]) {
      const refused = setSpendingCap({ ctx, input: { overage_cap_minor } })
      await expect(refused).rejects.toMatchObject({ code: "validation_failed" })
    }
  })
})

describe("the portal of the payment service", () => {
  it("ends the subscription with its period, and keeps it when asked to", async () => {
    const subscriber = await createSubscriber()
    await subscribe(subscriber)
    const ctx = subscriber.as("owner")
    const { url } = await openBillingPortal({ ctx, input: {} })
    expect((await visit(url)).text).toContain("End the subscription with this period")
    const ending = async () => (await showBilling({ ctx })).subscription?.cancel_at_period_end
    await visit(`${url}/cancel`, {})
    await until(async () => (await ending()) === true)
    expect(await showBilling({ ctx })).toMatchObject({ plan: "storefront", unit_cap: 50_000 })
    await visit(`${url}/keep`, {})
    await until(async () => (await ending()) === false)
  })

  it("refuses a card that cannot be saved and takes one that can", async () => {
    const subscriber = await createSubscriber()
    await subscribe(subscriber)
    const { url } = await openBillingPortal({
      ctx: subscriber.as("owner"),
      input: { flow: "payment_method_update" },
    })
    expect((await visit(`${url}/card`, { card: "declines" })).text).toContain("Your card was declined.")
    expect((await visit(`${url}/card`, { card: "asks" })).status).toBe(303)
    expect((await visit(url)).text).toContain("Card ending 3184")
  })
})
