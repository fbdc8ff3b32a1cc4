import Stripe from "stripe"
import { afterAll, beforeAll } from "vitest"
import { type RunningFake, startFake } from "@/fakes/stripe/start"

const testModeKey = process.env.STRIPE_TEST_MODE_KEY

/** What the contract suite runs against: the stand-in, or Stripe's test mode when its key is in the environment. */
export const isStandIn = !testModeKey

interface Subject {
  stripe: Stripe
  /** Address of the stand-in. */
  url: string
  secretKey: string
}

/** Starts the subject before the suite and ends it afterwards. */
export function givenSubject(webhook?: { url: () => string; secret: string }): Subject {
  const subject = { secretKey: testModeKey ?? "sk_test_practice" } as Subject
  let fake: RunningFake | undefined
  beforeAll(async () => {
    if (testModeKey) {
      subject.stripe = new Stripe(testModeKey, { telemetry: false })
      return
    }
    fake = await startFake({
      port: 0,
      secretKey: subject.secretKey,
      webhookSecret: webhook?.secret ?? "whsec_practice",
      webhookUrl: webhook?.url(),
    })
    subject.url = fake.url
    subject.stripe = clientOf(fake.url, subject.secretKey)
  })
  afterAll(() => fake?.close())
  return subject
}

/** The SDK as it is, pointed at a stand-in. */
export function clientOf(url: string, secretKey: string, options: Stripe.StripeConfig = {}): Stripe {
  const { hostname, port } = new URL(url)
  return new Stripe(secretKey, {
    host: hostname,
    port: Number(port),
    protocol: "http",
    telemetry: false,
    ...options,
  })
}

/** Asks the stand-in for what no client of the real service could. */
export async function control(
  subject: { url: string },
  method: string,
  path: string,
  body?: object,
): Promise<unknown> {
  const answer = await fetch(`${subject.url}/_fake/${path}`, {
    method,
    ...(body && { body: JSON.stringify(body) }),
  })
  if (!answer.ok) throw new Error(`${method} ${path}: ${answer.status} ${await answer.text()}`)
  return answer.json()
}

/** A customer with a practice card that behaves as the token says. */
export async function customerWithCard(
  stripe: Stripe,
  token: string,
  extra: Stripe.CustomerCreateParams = {},
) {
  const customer = await stripe.customers.create({
    email: "owner@fernhollow.test",
    name: "Fernhollow",
    ...extra,
  })
  const method = await stripe.paymentMethods.attach(token, { customer: customer.id })
  await stripe.customers.update(customer.id, { invoice_settings: { default_payment_method: method.id } })
  return customer
}

/** A product with one monthly price in US cents. */
export async function monthlyPrice(
  stripe: Stripe,
  unit_amount: number,
  extra: Partial<Stripe.PriceCreateParams> = {},
) {
  const product = await stripe.products.create({ name: `Plan at ${unit_amount}` })
  return stripe.prices.create({
    currency: "usd",
    product: product.id,
    unit_amount,
    recurring: { interval: "month" },
    ...extra,
  })
}

/** Moves a test clock on and waits until everything due in between is done. */
export async function advanceClock(stripe: Stripe, id: string, frozen_time: number): Promise<void> {
  await stripe.testHelpers.testClocks.advance(id, { frozen_time })
  for (let tries = 0; tries < 600; tries += 1) {
    if ((await stripe.testHelpers.testClocks.retrieve(id)).status === "ready") return
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  throw new Error("The clock did not arrive")
}
