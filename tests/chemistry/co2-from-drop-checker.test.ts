import { describe, expect, it } from "vitest"
import {
  co2FromDropChecker,
  type DropCheckerInput,
  dropCheckerDefaults,
} from "@/lib/chemistry/co2-from-drop-checker"
import { colourBands } from "@/lib/chemistry/colour-bands"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const answer = (change: Partial<DropCheckerInput>) =>
  co2FromDropChecker({ ...dropCheckerDefaults, ...change })

describe("CO2 from a drop checker", () => {
  it("is 30.3 mg/L at an indicator pH of 6.65 with 4 dKH at 25 °C, x/÷ 1.41 at one standard error", () => {
    const { result, uncertainty } = answer({ indicator_ph: 6.65 })
    expect(result.co2_mg_l).toBeCloseTo(30.3, 1)
    expect(Math.exp(uncertainty.sigma_ln)).toBeCloseTo(1.41, 2)
  })

  it.each([
    ["yellow", "dangerous"],
    ["yellow_green", "dangerous"],
    ["green", "high"],
    ["blue_green", "low"],
    ["blue", "low"],
  ])("reads %s as %s, by the upper end", (indicator_colour, level) => {
    expect(answer({ indicator_colour }).result.level).toBe(level)
  })

  it("reads green around the 30 mg/L that it is meant to show (common practice, no source)", () => {
    const { result } = answer({ indicator_colour: "green" })
    expect(result.co2_mg_l).toBeGreaterThan(25)
    expect(result.co2_mg_l).toBeLessThan(35)
    expect(result.indicator_ph).toBeCloseTo(6.65, 9)
  })

  it("says that the ends of the scale are open, and that the reading lags by hours", () => {
    const codes = (colour: string) => answer({ indicator_colour: colour }).cautions.map((c) => c.code)
    expect(codes("yellow")).toContain("end_of_scale")
    expect(codes("blue")).toContain("end_of_scale")
    expect(codes("green")).not.toContain("end_of_scale")
    expect(codes("green")).toContain("drop_checker_lag")
  })

  it("reads another card when its bands are given", () => {
    const bands = [{ colour: "teal", ph_from: 6.9, ph_to: 7.1 }]
    const input = { ...dropCheckerDefaults, indicator_colour: "teal" }
    expect(co2FromDropChecker(input, bands).result.co2_mg_l).toBeCloseTo(13.5, 1)
  })

  it("has bands that meet without a gap and span the dye's range, 6.0 to 7.6", () => {
    colourBands.slice(1).forEach((band, i) => {
      expect(band.ph_from).toBe(colourBands[i]!.ph_to)
    })
    expect(colourBands[0]!.ph_to).toBe(6)
    expect(colourBands.at(-1)!.ph_from).toBe(7.6)
  })

  it.each([
    ["indicator_ph", {}],
    ["indicator_ph", { indicator_ph: 6.6, indicator_colour: "green" }],
    ["indicator_colour", { indicator_colour: "purple" }],
    ["indicator_ph", { indicator_ph: 4 }],
    ["indicator_ph", { indicator_ph: 5, reference_kh_dkh: 30 }],
    ["reference_kh_dkh", { indicator_ph: 6.6, reference_kh_dkh: 0 }],
  ])("refuses and names %s for %o", (field, change) => {
    try {
      answer(change)
      expect.unreachable()
    } catch (error) {
      expect((error as OutOfDomain).field).toBe(field)
      expect(error).toBeInstanceOf(OutOfDomain)
    }
  })
})
