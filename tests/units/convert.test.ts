import fc from "fast-check"
import { describe, expect, it } from "vitest"
import {
  differenceFromBase,
  differenceToBase,
  fromBase,
  toBase,
  type UnitId,
  units,
} from "@/lib/units/convert"

const ids = Object.keys(units) as UnitId[]

describe("conversion", () => {
  // Definitions: 1 °dH = 10 mg/L CaO; NIST SP 811 for the customary units.
  it.each([
    [25, "f", 77],
    [0, "f", 32],
    [1, "kh_meq_l", 0.3566525],
    [1, "kh_ppm_caco3", 17.848],
    [1, "kh_mmol_l_caco3", 0.1783262],
    [1, "kh_fh", 1.7848],
    [1, "kh_clark", 1.2522],
    [0.5603, "kh_fh", 1],
    [0.7986, "kh_clark", 1],
    [1, "gh_mmol_l", 0.1783262],
    [1, "gh_ppm_caco3", 17.848],
    [100, "gal_us", 26.417205],
    [1000, "gph", 264.17205],
    [1, "ft", 3.2808399],
    [2.54, "in_of_cm", 1],
    [25.4, "in", 1],
    [1, "ft2", 10.76391],
    [1, "ft3", 35.314667],
    [1, "psi", 14.503774],
    [453.59237, "lb", 1],
    [28.349523125, "oz", 1],
    [28.349523125, "oz_day", 1],
  ] as const)("%d of the engine's unit is %s %d", (value, unit, expected) => {
    expect(Math.abs(fromBase(value, unit) / expected - 1)).toBeLessThan(1e-4)
  })

  it("counts 2.80385 dKH to the milliequivalent and 50.04 mg/L CaCO3 to it", () => {
    expect(toBase(1, "kh_meq_l")).toBeCloseTo(2.80385, 5)
    expect(fromBase(toBase(1, "kh_meq_l"), "kh_ppm_caco3")).toBeCloseTo(50.043, 2)
  })

  it("returns what went in, for every unit", () => {
    fc.assert(
      fc.property(fc.constantFrom(...ids), fc.double({ min: -1e6, max: 1e6, noNaN: true }), (unit, value) => {
        expect(toBase(fromBase(value, unit), unit)).toBeCloseTo(value, 6)
        expect(differenceToBase(differenceFromBase(value, unit), unit)).toBeCloseTo(value, 6)
      }),
    )
  })

  it("leaves the offset out of a difference of temperatures: ±1 °C is ±1.8 °F", () => {
    expect(differenceFromBase(1, "f")).toBe(1.8)
    expect(differenceToBase(9, "f")).toBe(5)
  })
})
