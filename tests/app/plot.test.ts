import fc from "fast-check"
import { describe, expect, it } from "vitest"
import { linear, ticksTo, ticksWithin } from "@/app/ui/plot"

describe("an axis", () => {
  it.each([
    [0, [0, 1]],
    [3, [0, 1, 2, 3]],
    [287, [0, 100, 200, 300]],
    [16_129, [0, 5_000, 10_000, 15_000, 20_000]],
  ])("up to %d has the marks %j", (top, ticks) => {
    expect(ticksTo(top)).toEqual(ticks)
  })

  it("reaches its highest value with evenly spaced whole marks, and not too many", () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 10_000_000 }), (top) => {
        const ticks = ticksTo(top)
        expect(ticks.at(-1)).toBeGreaterThanOrEqual(top)
        expect(ticks.length).toBeLessThanOrEqual(6)
        expect(ticks.every((tick) => Number.isInteger(tick))).toBe(true)
      }),
    )
  })

  it.each([
    [0, 1.6, [0, 0.5, 1, 1.5]],
    [6.4, 7.6, [6.5, 7, 7.5]],
    [0, 34.5, [0, 10, 20, 30]],
  ])("from %d to %d has the marks %j between its ends", (from, to, ticks) => {
    expect(ticksWithin(from, to, 4)).toEqual(ticks)
  })

  it("maps its ends to the ends", () => {
    const y = linear([0, 10], [200, 20])
    expect([y(0), y(5), y(10)]).toEqual([200, 110, 20])
  })
})
