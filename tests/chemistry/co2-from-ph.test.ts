import { describe, expect, it } from "vitest"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { type Co2FromPhInput, co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { ionicStrengthOfReference } from "@/lib/chemistry/ionic-strength"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const tank: Co2FromPhInput = { ...carbonateDefaults, ph: 6.8, kh_dkh: 4 }
const answer = (change: Partial<Co2FromPhInput> = {}) => co2FromPh({ ...tank, ...change })
const caution = (code: string, change: Partial<Co2FromPhInput>) =>
  answer(change).cautions.find((c) => c.code === code)

describe("CO2 from pH and KH", () => {
  it("is 21.0487 mg/L at 25 °C, 4 dKH, pH 6.8 with the ionic strength guessed from KH (worked example)", () => {
    const { result } = answer()
    expect(Math.abs(result.co2_mg_l / 21.0487 - 1)).toBeLessThan(2e-6)
    expect(result.ionic_strength_source).toBe("kh_dkh")
  })

  it("gives the other species of the worked example, which PHREEQC puts at 1.42483, 0.000477698, 1.91319 mmol/L", () => {
    const { result } = answer({ ionic_strength_mol_l: ionicStrengthOfReference(4) })
    expect(result.hco3_mmol_l).toBeCloseTo(1.42575182, 6)
    expect(result.co3_mmol_l).toBeCloseTo(4.780107e-4, 9)
    expect(result.dic_mmol_l).toBeCloseTo(1.91347308, 6)
    expect(result.pco2_uatm).toBeCloseTo(14357.058, 2)
    expect(result.degassed_ph).toBeCloseTo(8.332, 3)
    // 425 ppm of 1 atm less 0.031245 atm of vapour is 411.72 µatm (row P112 of the reference file).
    expect(result.saturation_ratio).toBeCloseTo(14357.058 / 411.72, 3)
  })

  it("has the interval of the specification's example: 68 % 16.5-27.9, 95 % 12.8-35.9 mg/L, sigma 0.262", () => {
    const { result, uncertainty } = answer({
      ionic_strength_mol_l: ionicStrengthOfReference(4),
      ph_error: 0.1,
      kh_error_dkh: 0.5,
      temperature_error_c: 1,
    })
    expect(uncertainty.sigma_ln).toBeCloseTo(0.2625, 3)
    expect(uncertainty.co2_low_68_mg_l.toFixed(1)).toBe("16.5")
    expect(uncertainty.co2_high_68_mg_l.toFixed(1)).toBe("27.9")
    expect(result.co2_low_mg_l.toFixed(1)).toBe("12.8")
    expect(result.co2_high_mg_l.toFixed(1)).toBe("35.9")
  })

  it("leaves only the model's error when the readings are exact: 1 % with conductivity, 2 % from KH", () => {
    const exact = { ph_error: 0, kh_error_dkh: 0, temperature_error_c: 0 }
    expect(answer({ ...exact, conductivity_us_cm: 300 }).uncertainty.sigma_ln).toBe(0.01)
    expect(answer(exact).uncertainty.sigma_ln).toBe(0.02)
  })

  it.each([
    [7.4, "low"],
    [6.8, "in_range"],
    [6.65, "high"],
    [6.5, "dangerous"],
  ] as const)("at pH %d calls the level %s, by the upper end of its interval", (ph, level) => {
    const { result } = answer({ ph })
    const limits = { low: [0, 20], in_range: [20, 40], high: [40, 60], dangerous: [60, 1e9] } as const
    expect(result.level).toBe(level)
    expect(result.co2_high_mg_l).toBeGreaterThan(limits[level][0])
    expect(result.co2_high_mg_l).toBeLessThanOrEqual(limits[level][1])
  })

  it("calls the same water safer when it is measured better", () => {
    expect(answer({ ph: 6.65 }).result.level).toBe("high")
    expect(answer({ ph: 6.65, ph_error: 0.02, kh_error_dkh: 0.2 }).result.level).toBe("in_range")
  })

  it("gives an upper bound alone when KH may be none", () => {
    const { result, cautions } = answer({ kh_dkh: 1, kh_error_dkh: 0.5 })
    expect(result.co2_low_mg_l).toBe(0)
    expect(result.co2_high_mg_l).toBeGreaterThan(result.co2_mg_l)
    expect(cautions.map((c) => c.code)).toContain("upper_bound_only")
    expect(answer({ kh_dkh: 1.1, kh_error_dkh: 0.5 }).result.co2_low_mg_l).toBeGreaterThan(0)
  })

  it("cites a source for each thing it used", () => {
    const used = (change: Partial<Co2FromPhInput>) =>
      answer(change)
        .method.sources.map((s) => s.title)
        .join()
    expect(used({})).toContain("Plummer & Busenberg")
    expect(used({})).not.toContain("Marion")
    expect(used({ conductivity_us_cm: 300 })).toContain("Marion")
    expect(used({ tds_mg_l: 100 })).toContain("Langelier")
    expect(used({ phosphate_mg_l: 1 })).toContain("Ball & Nordstrom")
  })
})

describe("cautions of CO2 from pH and KH", () => {
  it("shows livestock and the limits of the method on every answer", () => {
    const codes = answer().cautions.map((c) => c.code)
    expect(codes).toEqual(["livestock", "raise_slowly", "ph_is_no_proof", "common_chart"])
  })

  it.each([
    ["livestock", { ph: 6.65 }, /50 mg\/L/, "warning"],
    ["livestock", { ph: 6.2 }, /140 mg\/L/, "danger"],
    // 10^-5 / γ(H+) 0.964 in 0.107 mmol/L of alkalinity.
    ["acid_or_hydroxide", { ph: 5, kh_dkh: 0.3 }, /9\.7 %/, "warning"],
    ["low_kh", { kh_dkh: 0.8 }, /63 % of the reading/, "warning"],
    // 20 mg/L phosphate at 4 dKH and pH 6.8 over-reads by 4.8 % (the specification's table).
    ["phosphate", { phosphate_mg_l: 20, ionic_strength_mol_l: 0.00143 }, /20 mg\/L.*4\.[789] %/, "warning"],
    // Oliver, Thurman & Malcolm 1983: 20 mg/L DOC is 66 µeq/L, 18 % of 1 dKH.
    ["organic_acids", { doc_mg_l: 20, kh_dkh: 1 }, /20 mg\/L.*1[89] %/, "warning"],
    // 1 mg/L boron is about 8 µeq/L at pH 8.2.
    ["borate", { ph: 8.2, kh_dkh: 8 }, /7\.[5-9] µeq\/L|8\.[0-4] µeq\/L/, "info"],
    ["hard_and_alkaline", { ph: 8, gh_dgh: 10, kh_dkh: 8 }, /10 dGH.*3\.3 %/, "warning"],
    ["low_conductivity", { conductivity_us_cm: 80 }, /80 µS\/cm/, "warning"],
    ["outside_design_range", { temperature_c: 38 }, /38 °C \(designed for 10 to 35 °C\)/, "warning"],
    ["outside_design_range", { ph: 8.6 }, /pH 8\.6 \(designed for 5\.8 to 8\.4\)/, "warning"],
    ["common_chart", {}, /19 mg\/L, 9\.6 % less/, "info"],
  ] as const)("%s carries its numbers: %o", (code, change, message, severity) => {
    const found = caution(code, change)
    expect(found?.message).toMatch(message)
    expect(found?.severity).toBe(severity)
  })

  it.each([
    ["acid_or_hydroxide", { ph: 6.8 }],
    ["low_kh", { kh_dkh: 1 }],
    ["phosphate", { phosphate_mg_l: 5 }],
    ["organic_acids", { doc_mg_l: 5 }],
    ["borate", { ph: 7.9 }],
    ["hard_and_alkaline", { ph: 8, gh_dgh: 5 }],
    ["hard_and_alkaline", { ph: 7.8, gh_dgh: 10 }],
    ["low_conductivity", { conductivity_us_cm: 100 }],
    ["outside_design_range", { temperature_c: 35, kh_dkh: 20, ph: 8.4 }],
  ] as const)("leaves out %s at its limit: %o", (code, change) => {
    expect(caution(code, change)).toBeUndefined()
  })
})

describe("what CO2 from pH and KH refuses", () => {
  const refused = (change: Partial<Co2FromPhInput>) => {
    try {
      return answer(change)
    } catch (error) {
      return error instanceof OutOfDomain ? error.field : error
    }
  }
  it.each([
    ["ph", { ph: Number.NaN }],
    ["ph", { ph: 9.6 }],
    ["kh_dkh", { kh_dkh: 0 }],
    ["kh_dkh", { kh_dkh: Number.POSITIVE_INFINITY }],
    ["temperature_c", { temperature_c: -1 }],
    ["temperature_c", { temperature_c: 50.1 }],
    ["conductivity_us_cm", { conductivity_us_cm: 5000 }],
    ["ionic_strength_mol_l", { ionic_strength_mol_l: 0.06 }],
    ["ph_error", { ph_error: -0.1 }],
    // 1 atm of pure CO2 is not enough, and 0.2 dKH at pH 9.5 and 50 °C is all hydroxide.
    ["ph", { ph: 4.5, kh_dkh: 10 }],
    ["kh_dkh", { ph: 9.5, kh_dkh: 0.2, temperature_c: 50 }],
  ])("names %s for %o", (field, change) => {
    expect(refused(change)).toBe(field)
  })

  it("says how to mend it", () => {
    expect(() => answer({ ph: 12 })).toThrow("Enter 4 to 9.5; you gave 12.")
    expect(() => answer({ temperature_c: 60 })).toThrow("Enter 0 to 50 °C; you gave 60.")
  })
})
