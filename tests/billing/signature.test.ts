import Stripe from "stripe"
import { describe, expect, it } from "vitest"

// What the SDK's check of a signature does and does not do, as PLATFORM 3.17 measured it on 23.1.0. The webhook's own
// check of the future rests on the last of these; when an update of the SDK changes one, this says so.
const stripe = new Stripe("sk_test_unused")
const secret = "whsec_practice"
const payload = '{\n  "id": "evt_1",\n  "object": "event"\n}'
const now = 1_780_000_000

function passes(header: string, body = payload, tolerance?: number): boolean {
  try {
    stripe.webhooks.constructEvent(body, header, secret, tolerance, undefined, now * 1000)
    return true
  } catch (error) {
    expect(error).toBeInstanceOf(Stripe.errors.StripeSignatureVerificationError)
    return false
  }
}

function header(timestamp: number, key = secret): string {
  return stripe.webhooks.generateTestHeaderString({ payload, secret: key, timestamp })
}

describe("the SDK's check of a signature", () => {
  it("passes at 299 seconds of age and fails at 301", () => {
    expect(passes(header(now - 299))).toBe(true)
    expect(passes(header(now - 301))).toBe(false)
  })

  it("is off altogether with a tolerance of 0", () => {
    expect(passes(header(now - 86_400), payload, 0)).toBe(true)
  })

  it("passes when one of two signatures fits, as while a secret is rotated", () => {
    const [, other] = header(now, "whsec_old").split(",")
    expect(passes(`${header(now)},${other}`)).toBe(true)
    expect(passes(`t=${now},${other}`)).toBe(false)
  })

  it("fails on the same JSON written anew", () => {
    expect(passes(header(now), JSON.stringify(JSON.parse(payload)))).toBe(false)
  })

  it("fails with another secret and without one of ours", () => {
    expect(passes(header(now, "whsec_other"))).toBe(false)
    expect(passes(`t=${now}`)).toBe(false)
  })

  it("passes a day in the future, which is why ours looks there too", () => {
    expect(passes(header(now + 86_400))).toBe(true)
  })
})
