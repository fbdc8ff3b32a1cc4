import { describe, expect, it } from "vitest"
import {
  ionicStrength,
  ionicStrengthFromConductivity,
  ionicStrengthOfReference,
  type WaterReadings,
} from "@/lib/chemistry/ionic-strength"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const all: Required<WaterReadings> = {
  kh_dkh: 4,
  ionic_strength_mol_l: 0.004,
  conductivity_us_cm: 400,
  tds_mg_l: 200,
  tds_factor: 0.5,
  gh_dgh: 8,
}

describe("ionic strength", () => {
  it("takes the best reading there is and names it", () => {
    const order = ["ionic_strength_mol_l", "conductivity_us_cm", "tds_mg_l", "gh_dgh"] as const
    const given: { -readonly [K in keyof WaterReadings]: WaterReadings[K] } = { ...all }
    for (const best of order) {
      expect(ionicStrength(given).ionic_strength_source).toBe(best)
      given[best] = undefined
    }
    expect(ionicStrength(given).ionic_strength_source).toBe("kh_dkh")
  })

  it("follows Marion & Babcock 1976: 1 mS/cm is 10^1.159 = 14.42 mmol/L", () => {
    expect(ionicStrengthFromConductivity(1000) * 1000).toBeCloseTo(14.42, 2)
  })

  it("is close to what PHREEQC speciates in P071 (347.1 µS/cm, 4.20177 mmol/L) and P086 (1454.1, 14.2588)", () => {
    // The reference rows are hard water with some salt; the fit is for soil solutions, 20 % apart at most.
    expect(Math.abs(ionicStrengthFromConductivity(347.1) / 4.20177e-3 - 1)).toBeLessThan(0.2)
    expect(Math.abs(ionicStrengthFromConductivity(1454.1) / 14.2588e-3 - 1)).toBeLessThan(0.5)
  })

  it("goes from a TDS meter back to conductivity by its factor, and by Langelier 1936 without one", () => {
    const meter = ionicStrength({ kh_dkh: 4, tds_mg_l: 200, tds_factor: 0.5 })
    expect(meter.ionic_strength_mol_l).toBe(ionicStrengthFromConductivity(400))
    expect(ionicStrength({ kh_dkh: 4, tds_mg_l: 200 }).ionic_strength_mol_l).toBeCloseTo(0.005, 12)
  })

  it("adds up the ions of hard water: 8 dGH of chlorides with 4 dKH is 3 × 1.4266 + 0.5 mmol/L", () => {
    const { ionic_strength_mol_l } = ionicStrength({ kh_dkh: 4, gh_dgh: 8 })
    expect(ionic_strength_mol_l * 1000).toBeCloseTo(3 * 1.42661 + 0.5, 4)
  })

  it("adds up the ions of sodium water: 1 dGH with 8 dKH is 0.17833 + 2.85322 + 0.5 mmol/L", () => {
    const { ionic_strength_mol_l } = ionicStrength({ kh_dkh: 8, gh_dgh: 1 })
    expect(ionic_strength_mol_l * 1000).toBeCloseTo(0.178326 + 2.85322 + 0.5, 4)
  })

  it("is the 3.13991 mmol/L of the worked example from 4 dKH alone, and the alkalinity in a reference solution", () => {
    expect(ionicStrength({ kh_dkh: 4 }).ionic_strength_mol_l * 1000).toBeCloseTo(3.13991, 5)
    expect(ionicStrengthOfReference(4) * 1000).toBeCloseTo(1.42660984, 8)
  })

  it.each([
    ["conductivity_us_cm", { kh_dkh: 4, conductivity_us_cm: 4000 }],
    ["tds_mg_l", { kh_dkh: 4, tds_mg_l: 2500 }],
    ["gh_dgh", { kh_dkh: 4, gh_dgh: 100 }],
  ])("refuses brackish water and names %s", (field, water) => {
    expect(() => ionicStrength(water)).toThrow(OutOfDomain)
    expect(() => ionicStrength(water)).toThrow(new RegExp(`^${field}: .*0\\.05`))
  })

  it("reaches to about 3.4 mS/cm", () => {
    expect(ionicStrength({ kh_dkh: 4, conductivity_us_cm: 3400 }).ionic_strength_mol_l).toBeLessThan(0.05)
  })
})
