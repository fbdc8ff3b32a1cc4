import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { colebrook, frictionFactor, regimeOf } from "@/lib/flow/friction"
import { GRAVITY_M_S2 } from "@/lib/gas/bubble-rise"

/** Published worked examples; sources and tolerances as in tests/reference/flow-gas-published.csv, P14 to P19. */
const published = [
  ["White 7e, example 6.7: cast iron 200 mm", 1.27e5, 0.0013, 0.0225, 0.02],
  ["White 7e, example 6.6: 6 in asphalted cast iron", (6 * 0.5) / 1.1e-5, 0.0004 / 0.5, 0.0197, 0.02],
  ["Munson 6e, example 8.5: air in 4 mm drawn tubing", 13_700, 0.0015 / 4, 0.0291, 0.015],
  ["smooth pipe at Re 1e5, Prandtl", 1e5, 0, 0.018, 0.003],
] as const

describe("frictionFactor", () => {
  test.each(published)("gives the published factor of %s", (_, reynolds, roughness, factor, tolerance) => {
    expect(Math.abs(frictionFactor(reynolds, roughness) / factor - 1)).toBeLessThan(tolerance)
  })

  test("gives the published head loss: White 7e, example 6.7, 117 m over 500 m of 200 mm at 0.2 m³/s", () => {
    const velocity = 0.2 / ((Math.PI / 4) * 0.2 ** 2)
    const head =
      (frictionFactor((velocity * 0.2) / 1e-5, 0.0013) * (500 / 0.2) * velocity ** 2) / 2 / GRAVITY_M_S2
    expect(Math.abs(head / 117 - 1)).toBeLessThan(0.02)
  })

  test("is 64/Re in laminar flow, Hagen and Poiseuille", () => {
    expect(frictionFactor(640, 0.01)).toBeCloseTo(0.1, 12)
  })

  test("solves Colebrook's own equation to 1e-12", () => {
    fc.assert(
      fc.property(
        fc.double({ min: 4000, max: 1e6, noNaN: true }),
        fc.double({ min: 0, max: 0.05, noNaN: true }),
        (reynolds, roughness) => {
          const x = 1 / Math.sqrt(colebrook(reynolds, roughness))
          const residual = x + 2 * Math.log10(roughness / 3.7 + (2.51 * x) / reynolds)
          expect(Math.abs(residual)).toBeLessThan(1e-12)
        },
      ),
    )
  })

  test.each([2000, 4000])("has no kink at Re %i: value and slope meet", (reynolds) => {
    for (const roughness of [0, 1e-4, 0.01]) {
      const at = (offset: number) => frictionFactor(reynolds + offset, roughness)
      expect(Math.abs(at(0.001) - at(-0.001))).toBeLessThan(1e-7)
      const before = (at(-0.01) - at(-1.01)) / 1
      const after = (at(1.01) - at(0.01)) / 1
      expect(Math.abs(after - before)).toBeLessThan(1e-7)
    }
  })

  test("lets the head grow with the flow everywhere: f Re² is monotone", () => {
    for (const roughness of [0, 0.001, 0.05]) {
      let last = 0
      for (let reynolds = 10; reynolds < 1e5; reynolds *= 1.01) {
        const head = frictionFactor(reynolds, roughness) * reynolds ** 2
        expect(head).toBeGreaterThan(last)
        last = head
      }
    }
  })
})

test("regimeOf names the three regimes", () => {
  expect([1999, 2001, 3999, 4000].map(regimeOf)).toEqual([
    "laminar",
    "transitional",
    "transitional",
    "turbulent",
  ])
})
