import { describe, expect, it } from "vitest"
import { deciding, graceEnd, serviceState } from "@/lib/billing/service-state"

const since = new Date("2026-12-01T10:00:00Z")
const day = (days: number) => new Date(since.getTime() + days * 86_400_000)

describe("what a subscription gives", () => {
  // The rules of PLATFORM 3.20; prices and units of PRODUCT. A ceiling of 8 US dollars buys 10,000 units at 0.80 a thousand.
  it.each([
    ["active", null, 60_000],
    ["trialing", null, 60_000],
    ["past_due", day(-1), 60_000],
    ["past_due", day(-8), 50_000],
    ["unpaid", null, 0],
    ["paused", null, 0],
  ])("%s since %s: %i units of Storefront", (status, past_due_since, unit_cap) => {
    const standing = { plan: "storefront", status, past_due_since } as const
    expect(serviceState(standing, 800, since)).toEqual({ plan: "storefront", unit_cap })
  })

  it.each(["canceled", "incomplete", "incomplete_expired", "a word that Stripe adds later"])(
    "%s: the free plan, without overage",
    (status) => {
      const standing = { plan: "brand", status, past_due_since: null } as const
      expect(serviceState(standing, 800, since)).toEqual({ plan: "nano", unit_cap: 1000 })
    },
  )

  it("takes the overage away seven days after the payment was owed, to the second", () => {
    const standing = { plan: "storefront", status: "past_due", past_due_since: since } as const
    const end = graceEnd(since)
    expect(end).toEqual(day(7))
    expect(serviceState(standing, 800, new Date(end.getTime() - 1000)).unit_cap).toBe(60_000)
    expect(serviceState(standing, 800, end).unit_cap).toBe(50_000)
  })
})

describe("the subscription that decides", () => {
  const one = (status: string, onDay: number) => ({ status, created: day(onDay) })

  it("is the one that runs, whatever ended later", () => {
    const running = one("active", 1)
    expect(deciding([one("canceled", 5), running, one("incomplete_expired", 9)])).toBe(running)
  })

  it("is the newest of those that run", () => {
    const newest = one("past_due", 4)
    expect(deciding([one("active", 1), newest])).toBe(newest)
  })

  it("is the newest that ended when none runs", () => {
    const newest = one("canceled", 4)
    expect(deciding([one("canceled", 1), newest])).toBe(newest)
  })

  it("is none when nothing was ever paid", () => {
    expect(deciding([one("incomplete", 1), one("incomplete_expired", 2)])).toBeUndefined()
  })
})
