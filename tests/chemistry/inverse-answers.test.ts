import { describe, expect, it } from "vitest"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { ionicStrengthOfReference } from "@/lib/chemistry/ionic-strength"
import { khFromCo2 } from "@/lib/chemistry/kh-from-co2"
import { phForCo2 } from "@/lib/chemistry/ph-for-co2"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const water = carbonateDefaults

const refused = (run: () => unknown) => {
  try {
    return run()
  } catch (error) {
    return error instanceof OutOfDomain ? error.field : error
  }
}

describe("the pH set-point", () => {
  it("is PHREEQC's 6.654035 for 30 mg/L in 4 dKH sodium bicarbonate at 25 °C (row P097)", () => {
    const ionic_strength_mol_l = ionicStrengthOfReference(4)
    const { result } = phForCo2({ ...water, ionic_strength_mol_l, co2_mg_l: 30, kh_dkh: 4 })
    expect(Math.abs(result.ph - 6.654035)).toBeLessThan(0.003)
    // 8.332124 is PHREEQC's degassed pH of the same water (row P112).
    expect(Math.abs(result.ph_drop - (8.332124 - 6.654035))).toBeLessThan(0.006)
  })

  it("gives back the CO2 it was asked for, with the same interval and level", () => {
    const { result } = phForCo2({ ...water, co2_mg_l: 25, kh_dkh: 5 })
    const back = co2FromPh({ ...water, ph: result.ph, kh_dkh: 5 }).result
    expect(Math.abs(back.co2_mg_l / 25 - 1)).toBeLessThan(1e-8)
    expect(back.co2_high_mg_l).toBeCloseTo(result.co2_high_mg_l, 6)
    expect(back.level).toBe(result.level)
    expect(back.degassed_ph).toBe(result.degassed_ph)
  })

  it("has an interval of 1.96 standard errors on either side: meter 0.1 and KH 12.5 % (0.054) give 0.224", () => {
    const { result, uncertainty } = phForCo2({ ...water, co2_mg_l: 30, kh_dkh: 4 })
    expect(uncertainty.ph_sigma).toBeCloseTo(
      Math.hypot(0.1, 0.125 / 2.3042, 0.0062 / 2.3042, 0.02 / 2.3042),
      4,
    )
    expect(result.ph_high - result.ph).toBeCloseTo(1.96 * uncertainty.ph_sigma, 12)
    expect(result.ph - result.ph_low).toBeCloseTo(1.96 * uncertainty.ph_sigma, 12)
  })

  it("warns that a controller never opens when less CO2 is asked for than the air gives", () => {
    const codes = (co2_mg_l: number) =>
      phForCo2({ ...water, co2_mg_l, kh_dkh: 4 }).cautions.map((c) => c.code)
    expect(codes(0.3)).toContain("below_air")
    expect(codes(30)).not.toContain("below_air")
    expect(codes(30)).toEqual(expect.arrayContaining(["livestock", "raise_slowly", "calibrate_probe"]))
  })

  it("refuses CO2 that needs a pH outside the model, or more than pure gas", () => {
    expect(refused(() => phForCo2({ ...water, co2_mg_l: 0.01, kh_dkh: 20 }))).toBe("co2_mg_l")
    expect(refused(() => phForCo2({ ...water, co2_mg_l: 2000, kh_dkh: 4 }))).toBe("co2_mg_l")
  })
})

describe("KH from CO2 and pH", () => {
  it.each([
    ["kh_dkh", {}],
    ["gh_dgh", { gh_dgh: 8 }],
    ["conductivity_us_cm", { conductivity_us_cm: 350 }],
  ])("undoes CO2 from pH and KH when the ionic strength comes from %s", (source, readings) => {
    for (const kh_dkh of [0.6, 4, 17]) {
      const forward = co2FromPh({ ...water, ...readings, ph: 6.9, kh_dkh, phosphate_mg_l: 2 }).result
      const { result } = khFromCo2({
        ...water,
        ...readings,
        ph: 6.9,
        co2_mg_l: forward.co2_mg_l,
        phosphate_mg_l: 2,
      })
      expect(Math.abs(result.kh_dkh / kh_dkh - 1)).toBeLessThan(1e-8)
      expect(result.ionic_strength_source).toBe(source)
      expect(result.kh_low_dkh).toBeLessThan(kh_dkh)
      expect(result.kh_high_dkh).toBeGreaterThan(kh_dkh)
    }
  })

  it("refuses what no KH of 0.1 to 30 explains", () => {
    expect(refused(() => khFromCo2({ ...water, ph: 8.5, co2_mg_l: 100 }))).toBe("ph")
    expect(refused(() => khFromCo2({ ...water, ph: 4.2, co2_mg_l: 1 }))).toBe("ph")
    expect(refused(() => khFromCo2({ ...water, ph: 5, co2_mg_l: 0.1 }))).toBe("ph")
    expect(refused(() => khFromCo2({ ...water, ph: 9.4, co2_mg_l: 3000 }))).toBe("ph")
    expect(refused(() => khFromCo2({ ...water, ph: 6, co2_mg_l: 1600, temperature_c: 25 }))).toBe("ph")
    expect(refused(() => khFromCo2({ ...water, ph: 5, co2_mg_l: 1600, temperature_c: 25 }))).toBe("co2_mg_l")
  })
})
