import { beforeAll, describe, expect, it } from "vitest"
import { ensureMeter, ensurePrices } from "@/lib/billing/ensure-prices"
import { control, givenSubject } from "../fakes/stripe/subject"
import { billingSettings } from "./settings"

const subject = givenSubject()

beforeAll(() => Object.assign(process.env, billingSettings(subject.url, subject.secretKey)))

describe("the prices of a plan", () => {
  it("are made on first use as the plans' table has them", async () => {
    const { stripe } = subject
    const { base, overage } = await ensurePrices("storefront")
    const paid = await stripe.prices.retrieve(base, { expand: ["product"] })
    expect(paid).toMatchObject({
      unit_amount: 2900,
      currency: "usd",
      lookup_key: "tarnwright_storefront_month",
      metadata: { plan: "storefront" },
      recurring: { interval: "month", usage_type: "licensed" },
      product: { name: "Tarnwright Storefront" },
    })
    const used = await stripe.prices.retrieve(overage!)
    // 0.80 US dollars per 1,000 units are 0.08 cents a unit.
    expect(used.unit_amount_decimal?.toString()).toBe("0.08")
    expect(used.recurring).toMatchObject({ usage_type: "metered", meter: await ensureMeter() })
  })

  it("are found again and not made twice, even by two at once", async () => {
    const { stripe } = subject
    const [first, second] = await Promise.all([ensurePrices("brand"), ensurePrices("brand")])
    expect(second).toEqual(first)
    expect(await ensurePrices("brand")).toEqual(first)
    const { data } = await stripe.prices.list({ limit: 100 })
    expect(data.filter((price) => price.metadata.plan === "brand")).toHaveLength(2)
  })

  it("give way to a new one when the table has another amount", async () => {
    const { stripe } = subject
    const { base: before } = await ensurePrices("storefront")
    const { product } = await stripe.prices.retrieve(before)
    const dearer = await stripe.prices.create({
      currency: "usd",
      product: product as string,
      unit_amount: 3900,
      lookup_key: "tarnwright_storefront_month",
      transfer_lookup_key: true,
      recurring: { interval: "month" },
      metadata: { plan: "storefront" },
    })
    const { base } = await ensurePrices("storefront")
    expect(base).not.toBe(dearer.id)
    expect((await stripe.prices.retrieve(base)).unit_amount).toBe(2900)
    expect((await stripe.prices.retrieve(dearer.id)).lookup_key).toBeNull()
  })

  it("survive an answer that is lost on the way", async () => {
    await control(subject, "POST", "faults", { kind: "drop_connection", method: "GET", path: "/v1/prices" })
    expect((await ensurePrices("storefront")).base).toMatch(/^price_/)
  })
})
