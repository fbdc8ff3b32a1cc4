import { describe, expect, it } from "vitest"
import { livestock } from "@/lib/chemistry/cautions"
import { co2Band, co2Bands, co2Level } from "@/lib/chemistry/level"

describe("the level of CO2 by the upper end of its interval", () => {
  // Bands of the product's specification: 20 normal, 20-30 usual target, 30-40 caution, above 40 warn, above 60 alarm.
  it.each([
    [0, "low", "info"],
    [20, "low", "info"],
    [20.01, "in_range", "info"],
    [40, "in_range", "info"],
    [40.01, "high", "warning"],
    [60, "high", "warning"],
    [60.01, "dangerous", "danger"],
    [1e6, "dangerous", "danger"],
  ] as const)("of %d mg/L is %s, shown as %s", (co2, level, severity) => {
    expect(co2Level(co2)).toBe(level)
    expect(co2Band(co2).severity).toBe(severity)
    expect(livestock({ co2_high_mg_l: co2, pco2_uatm: 1000 * co2 }).severity).toBe(severity)
  })

  it("has bands that rise and leave nothing above them", () => {
    const limits = co2Bands.map((band) => band.up_to_mg_l)
    expect(limits).toEqual([...limits].sort((a, b) => a - b))
    expect(limits.at(-1)).toBe(Number.POSITIVE_INFINITY)
  })
})

describe("the caution about livestock", () => {
  it.each([
    [15, /as high as 15 mg\/L \(10000 µatm\).*usually bears/],
    [35, /35 mg\/L.*above the 30 mg\/L/],
    [50, /50 mg\/L.*Above 40 mg\/L/],
    [90, /90 mg\/L.*stop the gas and aerate.*150 mg\/L/],
  ])("at %d mg/L says the number, the pressure, what to watch and what to do", (co2_high_mg_l, message) => {
    const caution = livestock({ co2_high_mg_l, pco2_uatm: 10_000 })
    expect(caution.message).toMatch(message)
    expect(caution.message).toMatch(/gasping at the surface/)
  })
})
