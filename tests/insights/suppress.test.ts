import fc from "fast-check"
import { describe, expect, it } from "vitest"
import { suppressed } from "@/lib/insights/suppress"

const counts = fc.array(fc.integer({ min: 0, max: 60 }), { minLength: 1, maxLength: 12 })
const bucketsOf = (tanks: readonly number[]) => tanks.map((tanks, from) => ({ from, tanks }))

describe("a distribution that is shown", () => {
  it("has no bucket under five, and totals what it shows", () => {
    fc.assert(
      fc.property(counts, (tanks) => {
        const { tanks: total, buckets } = suppressed(bucketsOf(tanks))
        expect(buckets.every((bucket) => bucket.tanks >= 5)).toBe(true)
        expect(buckets.reduce((sum, bucket) => sum + bucket.tanks, 0)).toBe(total)
      }),
    )
  })

  it("says the same whatever the buckets that it leaves out hold", () => {
    fc.assert(
      fc.property(counts, fc.infiniteStream(fc.integer({ min: 0, max: 4 })), (tanks, others) => {
        const changed = tanks.map((count) => (count < 5 ? others.next().value : count))
        expect(suppressed(bucketsOf(changed))).toEqual(suppressed(bucketsOf(tanks)))
      }),
    )
  })

  it("counts no tank that is not there, and leaves out fewer than five of a bucket", () => {
    fc.assert(
      fc.property(counts, (tanks) => {
        const shown = new Map(suppressed(bucketsOf(tanks)).buckets.map(({ from, tanks }) => [from, tanks]))
        for (const [from, count] of tanks.entries()) {
          const left = count - (shown.get(from) ?? 0)
          expect(left).toBeGreaterThanOrEqual(0)
          expect(left).toBeLessThan(5)
        }
      }),
    )
  })
})
