import { describe, expect, it } from "vitest"
import { planOf, plans, unitCapOf } from "@/lib/billing/plans"

describe("the plans", () => {
  // The table of PRODUCT, "Plans": US dollars a month, included units, US dollars per 1,000 units beyond, calls a second.
  it.each([
    ["nano", 0, 1_000, null, 5, 1, 2],
    ["storefront", 29, 50_000, 0.8, 25, 10, 8],
    ["brand", 189, 500_000, 0.4, 100, null, null],
  ] as const)("%s is as published", (id, dollars, units, overage, calls_per_s, widgets, team) => {
    const plan = planOf(id)
    expect(plan.price_minor).toBe(dollars * 100)
    expect(plan.included_units).toBe(units)
    expect(plan.overage_minor_per_1000).toBe(overage === null ? null : overage * 100)
    expect(plan).toMatchObject({ calls_per_s, widgets, team })
  })

  it("an unknown id is a fault and not the free plan", () => {
    expect(() => planOf("gold")).toThrow("gold")
  })
})

describe("the units of a period", () => {
  it("stop at the included ones without a ceiling", () => {
    expect(unitCapOf(plans.storefront, 0)).toBe(50_000)
  })

  it("never cost more than the ceiling", () => {
    for (const ceiling of [1, 79, 80, 99, 12_345]) {
      const beyond = unitCapOf(plans.storefront, ceiling) - 50_000
      expect((beyond * 80) / 1000).toBeLessThanOrEqual(ceiling)
      expect(((beyond + 1) * 80) / 1000).toBeGreaterThan(ceiling)
    }
  })

  it("cannot be bought beyond the free plan", () => {
    expect(unitCapOf(plans.nano, 10_000)).toBe(1_000)
  })
})
