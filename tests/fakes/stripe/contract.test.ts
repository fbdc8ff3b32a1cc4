import { randomUUID } from "node:crypto"
import Stripe from "stripe"
import { describe, expect, test } from "vitest"
import { customerWithCard, givenSubject, monthlyPrice } from "./subject"

// What the product relies on, said through the unmodified SDK. With STRIPE_TEST_MODE_KEY it runs against Stripe itself.
const subject = givenSubject()

describe("requests", () => {
  test("a wrong key is an authentication error", async () => {
    const stranger = new Stripe("sk_test_wrong", {
      ...(subject.url && {
        host: new URL(subject.url).hostname,
        port: Number(new URL(subject.url).port),
        protocol: "http",
      }),
      telemetry: false,
    })
    await expect(stranger.customers.list()).rejects.toBeInstanceOf(Stripe.errors.StripeAuthenticationError)
  })

  test("an answer names its request and the version of the API", async () => {
    const { lastResponse } = await subject.stripe.customers.create({ name: "Fernhollow" })
    expect(lastResponse.requestId).toMatch(/^req_/)
    expect(lastResponse.apiVersion).toBe("2026-10-28.endive")
  })

  test("nested and listed parameters arrive as they were sent", async () => {
    const { stripe } = subject
    const made = await stripe.customers.create({
      name: "Quillback & Söhne [1]",
      address: { city: "Fern = Hollow", country: "US" },
      metadata: { account_id: "acct_1", "with space": "a&b=c" },
    })
    const read = await stripe.customers.retrieve(made.id)
    expect(read).toMatchObject({
      name: "Quillback & Söhne [1]",
      address: { city: "Fern = Hollow", country: "US", line1: null },
      metadata: { account_id: "acct_1", "with space": "a&b=c" },
    })
  })

  test("an empty text unsets a value and a metadata key", async () => {
    const { stripe } = subject
    const made = await stripe.customers.create({ description: "old", metadata: { a: "1", b: "2" } })
    const changed = await stripe.customers.update(made.id, { description: "", metadata: { a: "" } })
    expect(changed).toMatchObject({ description: null, metadata: { b: "2" } })
  })

  test("an unknown parameter, a missing one and an unknown id are each named", async () => {
    const { stripe } = subject
    const unknown = { name: "x", favourite_fish: "tetra" } as Stripe.CustomerCreateParams
    await expect(stripe.customers.create(unknown)).rejects.toMatchObject({
      type: "StripeInvalidRequestError",
      code: "parameter_unknown",
      param: "favourite_fish",
      statusCode: 400,
    })
    await expect(stripe.products.create({} as Stripe.ProductCreateParams)).rejects.toMatchObject({
      code: "parameter_missing",
      param: "name",
    })
    await expect(stripe.customers.retrieve("cus_nobody")).rejects.toMatchObject({
      code: "resource_missing",
      statusCode: 404,
    })
  })

  test("a deleted customer reads as deleted and cannot be changed", async () => {
    const { stripe } = subject
    const made = await stripe.customers.create({})
    expect(await stripe.customers.del(made.id)).toMatchObject({ id: made.id, deleted: true })
    expect(await stripe.customers.retrieve(made.id)).toMatchObject({ deleted: true })
    await expect(stripe.customers.update(made.id, { name: "x" })).rejects.toMatchObject({ statusCode: 404 })
  })
})

describe("idempotency", () => {
  test("the same key and body give the same object", async () => {
    const { stripe } = subject
    const idempotencyKey = randomUUID()
    const first = await stripe.customers.create({ name: "Once" }, { idempotencyKey })
    const second = await stripe.customers.create({ name: "Once" }, { idempotencyKey })
    expect(second.id).toBe(first.id)
    expect(second.lastResponse.headers["idempotent-replayed"]).toBe("true")
  })

  test("the same key with another body is refused", async () => {
    const { stripe } = subject
    const idempotencyKey = randomUUID()
    await stripe.customers.create({ name: "One" }, { idempotencyKey })
    await expect(stripe.customers.create({ name: "Two" }, { idempotencyKey })).rejects.toBeInstanceOf(
      Stripe.errors.StripeIdempotencyError,
    )
  })

  test("a refused parameter does not burn the key", async () => {
    const { stripe } = subject
    const idempotencyKey = randomUUID()
    await expect(stripe.products.create({ name: "" }, { idempotencyKey })).rejects.toMatchObject({
      statusCode: 400,
    })
    expect(await stripe.products.create({ name: "Good" }, { idempotencyKey })).toMatchObject({ name: "Good" })
  })
})

describe("lists", () => {
  test("pages run newest first, without a gap or a repeat", async () => {
    const { stripe } = subject
    const email = `${randomUUID()}@fernhollow.test`
    const made: string[] = []
    for (let index = 0; index < 5; index += 1) made.push((await stripe.customers.create({ email })).id)
    const first = await stripe.customers.list({ email, limit: 2 })
    expect(first).toMatchObject({ object: "list", has_more: true, url: "/v1/customers" })
    const all: string[] = []
    for await (const customer of stripe.customers.list({ email, limit: 2 })) all.push(customer.id)
    expect(all).toEqual([...made].reverse())
    const last = await stripe.customers.list({ email, limit: 2, starting_after: all[3]! })
    expect(last).toMatchObject({ has_more: false, data: [{ id: made[0] }] })
    const back = await stripe.customers.list({ email, limit: 2, ending_before: all[2]! })
    expect(back.data.map((one) => one.id)).toEqual(all.slice(0, 2))
  })

  test("a page of 101 is refused", async () => {
    await expect(subject.stripe.customers.list({ limit: 101 })).rejects.toMatchObject({ param: "limit" })
  })
})

describe("prices", () => {
  test("a fraction of a cent comes back as the SDK's decimal", async () => {
    const { stripe } = subject
    const product = await stripe.products.create({ name: "Fractions" })
    const price = await stripe.prices.create({
      currency: "usd",
      product: product.id,
      unit_amount_decimal: Stripe.Decimal.from("0.08"),
      recurring: { interval: "month" },
    })
    expect(price.unit_amount).toBeNull()
    expect(typeof price.unit_amount_decimal).toBe("object")
    expect(price.unit_amount_decimal?.toString()).toBe("0.08")
  })

  test("tiers are sent only when they are asked for", async () => {
    const { stripe } = subject
    const product = await stripe.products.create({ name: "Tiered" })
    const made = await stripe.prices.create({
      currency: "usd",
      product: product.id,
      billing_scheme: "tiered",
      tiers_mode: "graduated",
      recurring: { interval: "month" },
      tiers: [
        { up_to: 1000, unit_amount: 0 },
        { up_to: "inf", unit_amount_decimal: Stripe.Decimal.from("0.5") },
      ],
    })
    expect(await stripe.prices.retrieve(made.id)).not.toHaveProperty("tiers")
    const { tiers } = await stripe.prices.retrieve(made.id, { expand: ["tiers"] })
    expect(tiers).toMatchObject([
      { up_to: 1000, unit_amount: 0 },
      { up_to: null, unit_amount: null },
    ])
  })

  test("a lookup key belongs to one price and moves on request", async () => {
    const { stripe } = subject
    const lookup_key = `plan:${randomUUID()}`
    const old = await monthlyPrice(stripe, 2900, { lookup_key })
    await expect(monthlyPrice(stripe, 3100, { lookup_key })).rejects.toMatchObject({ param: "lookup_key" })
    const next = await monthlyPrice(stripe, 3100, { lookup_key, transfer_lookup_key: true })
    const { data } = await stripe.prices.list({ lookup_keys: [lookup_key], expand: ["data.product"] })
    expect(data).toMatchObject([{ id: next.id, product: { object: "product", name: "Plan at 3100" } }])
    expect((await stripe.prices.retrieve(old.id)).lookup_key).toBeNull()
  })
})

describe("subscriptions", () => {
  test("a good card starts one, with its period on the item and a paid invoice", async () => {
    const { stripe } = subject
    const customer = await customerWithCard(stripe, "pm_card_visa")
    const price = await monthlyPrice(stripe, 2900)
    const subscription = await stripe.subscriptions.create({
      customer: customer.id,
      items: [{ price: price.id }],
      metadata: { account_id: "acct_1" },
      expand: ["latest_invoice"],
    })
    expect(subscription).toMatchObject({ status: "active", metadata: { account_id: "acct_1" } })
    const item = subscription.items.data[0]!
    expect(item.current_period_end - item.current_period_start).toBeGreaterThan(27 * 86_400)
    expect(subscription).not.toHaveProperty("current_period_end")
    const invoice = subscription.latest_invoice as Stripe.Invoice
    expect(invoice).toMatchObject({
      status: "paid",
      total: 2900,
      amount_paid: 2900,
      billing_reason: "subscription_create",
    })
    expect(invoice.parent?.subscription_details?.subscription).toBe(subscription.id)
    expect(invoice.number).toBeTruthy()
    expect(invoice.hosted_invoice_url).toMatch(/^http/)
  })

  test("a declined card is a card error and starts nothing", async () => {
    const { stripe } = subject
    const customer = await customerWithCard(stripe, "pm_card_chargeCustomerFail")
    const price = await monthlyPrice(stripe, 2900)
    const params = {
      customer: customer.id,
      items: [{ price: price.id }],
      payment_behavior: "error_if_incomplete",
    } satisfies Stripe.SubscriptionCreateParams
    await expect(stripe.subscriptions.create(params)).rejects.toMatchObject({
      type: "StripeCardError",
      code: "card_declined",
      decline_code: "generic_decline",
      statusCode: 402,
    })
    expect((await stripe.subscriptions.list({ customer: customer.id, status: "all" })).data).toEqual([])
  })

  test("a card that cannot be saved is refused when it is attached", async () => {
    await expect(customerWithCard(subject.stripe, "pm_card_chargeDeclined")).rejects.toMatchObject({
      code: "card_declined",
    })
  })

  test("without payment it is incomplete, and paying its invoice makes it active", async () => {
    const { stripe } = subject
    const customer = await customerWithCard(stripe, "pm_card_visa")
    const price = await monthlyPrice(stripe, 2900)
    const made = await stripe.subscriptions.create({
      customer: customer.id,
      items: [{ price: price.id }],
      payment_behavior: "default_incomplete",
    })
    expect(made.status).toBe("incomplete")
    await stripe.invoices.pay(made.latest_invoice as string)
    expect((await stripe.subscriptions.retrieve(made.id)).status).toBe("active")
  })

  test("an upgrade is invoiced at once for the rest of the period, as its preview said", async () => {
    const { stripe } = subject
    const customer = await customerWithCard(stripe, "pm_card_visa")
    const [small, large] = [await monthlyPrice(stripe, 2900), await monthlyPrice(stripe, 18_900)]
    const made = await stripe.subscriptions.create({ customer: customer.id, items: [{ price: small.id }] })
    const item = made.items.data[0]!
    const proration_date = item.current_period_start + 1
    const items = [{ id: item.id, price: large.id }]
    const preview = await stripe.invoices.createPreview({
      customer: customer.id,
      subscription: made.id,
      subscription_details: { items, proration_behavior: "always_invoice", proration_date },
    })
    await new Promise((resolve) => setTimeout(resolve, 1100))
    const changed = await stripe.subscriptions.update(made.id, {
      items,
      proration_behavior: "always_invoice",
      payment_behavior: "pending_if_incomplete",
      proration_date,
      expand: ["latest_invoice"],
    })
    const invoice = changed.latest_invoice as Stripe.Invoice
    expect(changed.items.data).toMatchObject([{ price: { id: large.id } }])
    expect(invoice).toMatchObject({
      status: "paid",
      billing_reason: "subscription_update",
      total: preview.total,
    })
    // One second less than the whole month of the difference.
    expect(invoice.total).toBeGreaterThan(15_995)
    expect(invoice.total).toBeLessThanOrEqual(16_000)
  })

  test("an upgrade that is not paid changes nothing but waits", async () => {
    const { stripe } = subject
    const customer = await customerWithCard(stripe, "pm_card_visa")
    const [small, large] = [await monthlyPrice(stripe, 2900), await monthlyPrice(stripe, 18_900)]
    const made = await stripe.subscriptions.create({ customer: customer.id, items: [{ price: small.id }] })
    const failing = await stripe.paymentMethods.attach("pm_card_chargeCustomerFail", {
      customer: customer.id,
    })
    await stripe.customers.update(customer.id, { invoice_settings: { default_payment_method: failing.id } })
    const changed = await stripe.subscriptions.update(made.id, {
      items: [{ id: made.items.data[0]!.id, price: large.id }],
      proration_behavior: "always_invoice",
      payment_behavior: "pending_if_incomplete",
    })
    expect(changed.items.data[0]!.price.id).toBe(small.id)
    expect(changed.pending_update?.subscription_items?.[0]?.price.id).toBe(large.id)
  })

  test("ending with the period keeps it active until then, and can be taken back", async () => {
    const { stripe } = subject
    const customer = await customerWithCard(stripe, "pm_card_visa")
    const price = await monthlyPrice(stripe, 2900)
    const made = await stripe.subscriptions.create({ customer: customer.id, items: [{ price: price.id }] })
    const ending = await stripe.subscriptions.update(made.id, { cancel_at_period_end: true })
    expect(ending).toMatchObject({ status: "active", cancel_at_period_end: true })
    expect(ending.cancel_at).toBe(made.items.data[0]!.current_period_end)
    const kept = await stripe.subscriptions.update(made.id, { cancel_at_period_end: false })
    expect(kept).toMatchObject({ cancel_at_period_end: false, cancel_at: null })
    expect(await stripe.subscriptions.cancel(made.id)).toMatchObject({ status: "canceled" })
  })
})

describe("checkout and portal", () => {
  test("a session waits at an address of its own and has no subscription yet", async () => {
    const { stripe } = subject
    const customer = await stripe.customers.create({ email: "owner@fernhollow.test" })
    const price = await monthlyPrice(stripe, 2900)
    const session = await stripe.checkout.sessions.create({
      mode: "subscription",
      customer: customer.id,
      client_reference_id: "acct_1",
      line_items: [{ price: price.id, quantity: 1 }],
      success_url: "https://tarnwright.test/done?session={CHECKOUT_SESSION_ID}",
      cancel_url: "https://tarnwright.test/billing",
      subscription_data: { metadata: { account_id: "acct_1" } },
      tax_id_collection: { enabled: true },
      customer_update: { address: "auto", name: "auto" },
    })
    expect(session).toMatchObject({
      status: "open",
      payment_status: "unpaid",
      subscription: null,
      amount_total: 2900,
    })
    expect(session.url).toMatch(/^https?:\/\//)
    expect(session).not.toHaveProperty("line_items")
    const lines = await stripe.checkout.sessions.listLineItems(session.id)
    expect(lines.data).toMatchObject([{ quantity: 1, price: { id: price.id } }])
    expect(await stripe.checkout.sessions.expire(session.id)).toMatchObject({ status: "expired", url: null })
  })

  test("automatic tax for a customer without address needs leave to update it", async () => {
    const { stripe } = subject
    const customer = await stripe.customers.create({})
    const price = await monthlyPrice(stripe, 2900)
    const params: Stripe.Checkout.SessionCreateParams = {
      mode: "subscription",
      customer: customer.id,
      line_items: [{ price: price.id, quantity: 1 }],
      success_url: "https://tarnwright.test/done",
      automatic_tax: { enabled: true },
    }
    await expect(stripe.checkout.sessions.create(params)).rejects.toMatchObject({
      code: "customer_tax_location_invalid",
    })
  })

  test("a portal session opens for one customer", async () => {
    const { stripe } = subject
    const customer = await stripe.customers.create({})
    const return_url = "https://tarnwright.test/billing"
    const session = await stripe.billingPortal.sessions.create({ customer: customer.id, return_url })
    expect(session).toMatchObject({ object: "billing_portal.session", customer: customer.id, return_url })
    expect(session.url).toMatch(/^https?:\/\//)
  })
})
