import { describe, expect, it } from "vitest"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { co2FromPhDrop, type PhDropInput, phDropDefaults } from "@/lib/chemistry/co2-from-ph-drop"
import { ionicStrengthOfReference } from "@/lib/chemistry/ionic-strength"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const readings: PhDropInput = { ...phDropDefaults, tank_ph: 6.8, degassed_ph: 8.32, kh_dkh: 4 }
const answer = (change: Partial<PhDropInput> = {}) => co2FromPhDrop({ ...readings, ...change })
const caution = (code: string, change: Partial<PhDropInput> = {}) =>
  answer(change).cautions.find((c) => c.code === code)

describe("CO2 from the pH drop", () => {
  it("agrees with pH and KH when both readings are true", () => {
    const forward = co2FromPh({ ...carbonateDefaults, ph: 6.8, kh_dkh: 4 }).result
    const { result } = answer({ degassed_ph: forward.degassed_ph })
    expect(Math.abs(result.co2_mg_l / forward.co2_mg_l - 1)).toBeLessThan(1e-8)
    expect(result.method_ratio).toBeCloseTo(1, 8)
    expect(result.pco2_uatm).toBeCloseTo(forward.pco2_uatm, 4)
  })

  it("starts from the 0.615 mg/L that water holds under 425 ppm at 25 °C", () => {
    expect(answer().result.baseline_co2_mg_l).toBeCloseTo(0.615, 3)
  })

  // HCO3- of the tank over that of the degassed water at 25 °C and 425 ppm.
  it.each([
    [2, 8.041, 1.013],
    [4, 8.332, 1.024],
    [8, 8.617, 1.047],
  ])("takes %d dKH into account by a factor", (kh_dkh, degassed_ph, factor) => {
    const ionic_strength_mol_l = ionicStrengthOfReference(kh_dkh)
    const { result } = answer({ kh_dkh, degassed_ph, tank_ph: degassed_ph - 1.67, ionic_strength_mol_l })
    const found = result.co2_mg_l / (result.baseline_co2_mg_l * 10 ** 1.67)
    expect(Math.abs(found - factor)).toBeLessThan(0.0006)
  })

  it("does not need KH: the degassed pH of a sample in balance tells it", () => {
    const degassed_ph = co2FromPh({ ...carbonateDefaults, ph: 6.8, kh_dkh: 4 }).result.degassed_ph
    const without = answer({ degassed_ph, kh_dkh: undefined })
    expect(Math.abs(without.result.co2_mg_l / answer({ degassed_ph }).result.co2_mg_l - 1)).toBeLessThan(1e-8)
    expect(without.result).not.toHaveProperty("method_ratio")
    expect(without.assumptions.map((a) => a.code)).toContain("kh_from_degassed_ph")
  })

  it("cancels the offset of the meter", () => {
    const shifted = answer({ tank_ph: 6.9, degassed_ph: 8.42 }).result.co2_mg_l
    expect(Math.abs(shifted / answer().result.co2_mg_l - 1)).toBeLessThan(0.01)
  })

  it("is in proportion to the CO2 of the air", () => {
    const crowded = answer({ air_co2_ppm: 850 }).result.co2_mg_l
    expect(crowded / answer().result.co2_mg_l).toBeCloseTo(2, 8)
  })

  it("from a tank before the gas goes on, 1.0 is ten times what that tank held, within a wide interval", () => {
    const { result, uncertainty } = answer({
      baseline: "tank_before_gas",
      tank_ph: 6.6,
      degassed_ph: 7.6,
      kh_dkh: undefined,
    })
    expect(result.co2_mg_l).toBeCloseTo(30, 0)
    expect(uncertainty.contributions.baseline).toBe(0.35)
    expect(result.co2_high_mg_l).toBeGreaterThan(60)
  })
})

describe("cautions of the pH drop", () => {
  it("shows what 1.0 means: 6.3 mg/L from this baseline, and a drop of 1.66 to 1.69 for 30 mg/L", () => {
    for (const [kh_dkh, degassed_ph] of [
      [2, 8.04],
      [4, 8.33],
      [8, 8.6],
    ] as const) {
      const found = /takes a drop of (\d\.\d\d)/.exec(
        caution("one_ph_rule", { kh_dkh, degassed_ph, tank_ph: degassed_ph - 1.67 })!.message,
      )
      expect(Number(found![1])).toBeGreaterThanOrEqual(1.66)
      expect(Number(found![1])).toBeLessThanOrEqual(1.69)
    }
    // With 1,000 ppm in the room 30 mg/L needs 1.31.
    expect(caution("one_ph_rule", { air_co2_ppm: 1000, degassed_ph: 7.97 })!.message).toMatch(
      /drop of 1\.3[01]/,
    )
  })

  it("says what the air of a crowded room would make of it, or what a resting tank may have held", () => {
    expect(caution("air_of_the_room")!.message).toMatch(/1,000 ppm.*49 mg\/L instead of 21/)
    const resting = { baseline: "tank_before_gas", tank_ph: 6.6, degassed_ph: 7.6 } as const
    expect(caution("baseline_not_air", resting)!.message).toMatch(/20 to 40 mg\/L/)
    expect(caution("air_of_the_room", resting)).toBeUndefined()
  })

  it("suspects acids, KH or the air when pH and KH say more than 1.3 times as much", () => {
    const message = caution("methods_disagree", { degassed_ph: 8.1 })!.message
    expect(message).toMatch(/should end at pH 8\.32, you read 8\.1/)
    expect(caution("methods_disagree", { degassed_ph: 8.25 })).toBeUndefined()
    expect(caution("methods_disagree", { degassed_ph: 8.5 })!.message).toMatch(/KH reading that is too low/)
  })

  it("says how much hidden phosphate would hide: PHREEQC's constants give 2.6 % for 5 mg/L at 4 dKH", () => {
    const hidden = /hide ([\d.]+) %/.exec(caution("buffers_read_low", { tank_ph: 6.65 })!.message)
    expect(Math.abs(Number(hidden![1]) - 2.6)).toBeLessThan(0.15)
    expect(caution("buffers_read_low", { phosphate_mg_l: 0 })).toBeUndefined()
  })

  it("notices a pH that did not drop", () => {
    expect(caution("no_drop", { tank_ph: 8.4, degassed_ph: 8.32 })?.severity).toBe("warning")
  })
})

describe("what the pH drop refuses", () => {
  const refused = (change: Partial<PhDropInput>) => {
    try {
      return answer(change)
    } catch (error) {
      return error instanceof OutOfDomain ? error.field : error
    }
  }
  it.each([
    ["tank_ph", { tank_ph: 3 }],
    ["degassed_ph", { degassed_ph: 5.2, tank_ph: 5, kh_dkh: undefined }],
    ["degassed_ph", { degassed_ph: 9.4, kh_dkh: undefined }],
    ["tank_ph", { tank_ph: 4.2, kh_dkh: undefined }],
    ["tank_ph", { tank_ph: 4.2 }],
  ])("names %s for %o", (field, change) => {
    expect(refused(change)).toBe(field)
  })
})
