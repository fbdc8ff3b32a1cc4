import fc from "fast-check"
import { describe, expect, it } from "vitest"
import { findRoot, NotConverged } from "@/lib/numeric/find-root"

describe("findRoot", () => {
  it("finds the published root of Brent's own test, x³ - 2x - 5 (2.0945514815423265, Wallis 1685)", () => {
    const root = findRoot({ f: (x) => x ** 3 - 2 * x - 5, low: 2, high: 3, tolerance: 1e-14 })
    expect(root).toBeCloseTo(2.0945514815423265, 13)
  })

  it("finds the Dottie number, cos x = x (0.7390851332151607)", () => {
    expect(findRoot({ f: (x) => Math.cos(x) - x, low: 0, high: 1, tolerance: 1e-14 })).toBeCloseTo(
      0.7390851332151607,
      13,
    )
  })

  it("meets its tolerance for any steep or flat monotone function", () => {
    fc.assert(
      fc.property(fc.double({ min: -8, max: 8, noNaN: true }), fc.integer({ min: 0, max: 6 }), (root, k) => {
        const f = (x: number) => Math.sinh((x - root) * k) + (x - root) ** 3 + 1e-3 * (x - root)
        expect(Math.abs(findRoot({ f, low: -10, high: 10, tolerance: 1e-10 }) - root)).toBeLessThan(1e-10)
      }),
    )
  })

  it("meets its tolerance where only bisection helps, on a step", () => {
    const root = findRoot({ f: (x) => Math.sign(x - 1 / 3), low: 0, high: 1, tolerance: 1e-6 })
    expect(Math.abs(root - 1 / 3)).toBeLessThanOrEqual(1e-6)
  })

  it("returns an end that is itself the root", () => {
    expect(findRoot({ f: (x) => x, low: 0, high: 1, tolerance: 1e-9 })).toBe(0)
    expect(findRoot({ f: (x) => x - 1, low: 0, high: 1, tolerance: 1e-9 })).toBe(1)
  })

  it("uses far fewer evaluations than bisection (34) on a smooth function", () => {
    let calls = 0
    const f = (x: number) => {
      calls++
      return Math.exp(x) - 2
    }
    findRoot({ f, low: 0, high: 1, tolerance: 1e-10 })
    expect(calls).toBeLessThan(12)
  })

  it("names a missing bracket, a function that is not a number, and a loop that ran out", () => {
    const reason = (run: () => number) => {
      try {
        run()
      } catch (error) {
        return error instanceof NotConverged ? error.reason : error
      }
    }
    expect(reason(() => findRoot({ f: (x) => x + 2, low: 0, high: 1, tolerance: 1e-9 }))).toBe("no_bracket")
    expect(reason(() => findRoot({ f: () => Number.NaN, low: 0, high: 1, tolerance: 1e-9 }))).toBe(
      "no_bracket",
    )
    const hard = { f: (x: number) => Math.sign(x - 1 / 3), low: 0, high: 1, tolerance: 1e-12 }
    expect(reason(() => findRoot({ ...hard, maxIterations: 5 }))).toBe("iterations")
  })
})
