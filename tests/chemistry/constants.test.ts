import { describe, expect, it } from "vitest"
import { activityCoefficients, debyeHuckel } from "@/lib/chemistry/activity"
import {
  logHenry,
  logHenrySlope,
  logK1,
  logK1Slope,
  logK2,
  logK2Phosphate,
  logKw,
} from "@/lib/chemistry/constants"
import {
  airPressureAtm,
  dielectric,
  waterDensity,
  waterDensityKgL,
  waterVapourPressureAtm,
} from "@/lib/chemistry/water"

/**
 * The equations of the cited papers, worked out apart from this code when the model was specified; the published
 * values that they were held against are in tests/reference/carbonate-published.csv.
 */
const table = [
  // t, ρ, ε, A, B, log K1, log K2, log KH, log Kw, pH2O
  [0, 999.8395, 87.8564, 0.49082, 0.32462, -6.5786, -10.6286, -1.1084, -14.9412, 0.006025],
  [5, 999.9638, 85.8836, 0.49423, 0.32538, -6.5163, -10.5544, -1.1921, -14.7317, 0.008601],
  [10, 999.6996, 83.9499, 0.49785, 0.32615, -6.4633, -10.4879, -1.2694, -14.5329, 0.012106],
  [15, 999.0996, 82.0555, 0.50169, 0.32692, -6.4188, -10.4284, -1.3408, -14.3442, 0.016813],
  [20, 998.2041, 80.2004, 0.50575, 0.3277, -6.3819, -10.3756, -1.4069, -14.165, 0.023057],
  [25, 997.0449, 78.3844, 0.51001, 0.32849, -6.3519, -10.3289, -1.4679, -13.9946, 0.031245],
  [30, 995.6473, 76.6073, 0.5145, 0.32929, -6.3281, -10.2879, -1.5244, -13.8328, 0.04186],
  [35, 994.0319, 74.8685, 0.5192, 0.33011, -6.3102, -10.2523, -1.5766, -13.679, 0.055481],
  [40, 992.2158, 73.1675, 0.52411, 0.33095, -6.2974, -10.2217, -1.6249, -13.5327, 0.072784],
  [45, 990.2132, 71.5038, 0.52923, 0.3318, -6.2894, -10.1958, -1.6696, -13.3936, 0.094556],
  [50, 988.0363, 69.8766, 0.53457, 0.33267, -6.2858, -10.1744, -1.7108, -13.2613, 0.121707],
] as const

describe("constants of the carbonate system", () => {
  it.each(table)("agree with the check table to its last digit at %d °C", (t, ...expected) => {
    const actual = [
      waterDensity(t),
      dielectric(t),
      debyeHuckel(t).a,
      debyeHuckel(t).b,
      logK1(t),
      logK2(t),
      logHenry(t),
      logKw(t),
      waterVapourPressureAtm(t),
    ]
    const decimals = [4, 4, 5, 5, 4, 4, 4, 4, 6]
    expect(actual.map((value, i) => value.toFixed(decimals[i]))).toEqual(
      expected.map((value, i) => value.toFixed(decimals[i])),
    )
  })

  it("takes the Kell denominator that gives 997.045 at 25 °C, not the misprint that gives 996.73", () => {
    expect(waterDensityKgL(25)).toBeCloseTo(0.997045, 6)
  })

  it("has phosphate's second constant of phreeqc.dat at 25 °C, -7.207, rising with temperature", () => {
    expect(logK2Phosphate(25)).toBeCloseTo(-7.207, 12)
    // van't Hoff with 0.99 kcal/mol between 25 and 35 °C: 0.99·4184/(8.31446·ln 10)·(1/298.15 - 1/308.15)
    expect(logK2Phosphate(35) - logK2Phosphate(25)).toBeCloseTo(0.02355, 4)
  })

  it.each([5, 15, 25, 35, 45])("has the slopes of log K1 and log KH at %d °C (central differences)", (t) => {
    const slope = (f: (t: number) => number) => (f(t + 1e-3) - f(t - 1e-3)) / 2e-3
    expect(logK1Slope(t)).toBeCloseTo(slope(logK1), 7)
    expect(logHenrySlope(t)).toBeCloseTo(slope(logHenry), 7)
  })

  it.each([
    [0, 1],
    [1000, 0.88699],
    [2000, 0.78456],
    [3000, 0.69204],
  ])("has the air pressure of ISO 2533 at %d m", (altitude, expected) => {
    // Table of the standard: 101.325, 89.876, 79.501, 70.121 kPa.
    expect(Math.abs(airPressureAtm(altitude) - expected)).toBeLessThan(2e-4)
  })
})

describe("activity coefficients", () => {
  it("are those of the worked example at 25 °C and 1.42661 mmol/L", () => {
    const gamma = activityCoefficients({ temperature_c: 25, ionic_strength_mol_l: 1.42660984e-3 })
    expect(gamma.hco3).toBeCloseTo(0.95925083, 8)
    expect(gamma.co3).toBeCloseTo(0.84661135, 8)
    expect(gamma.co2).toBeCloseTo(1.00021747, 8)
  })

  it("are all 1 in pure water", () => {
    const gamma = activityCoefficients({ temperature_c: 20, ionic_strength_mol_l: 0 })
    expect(Object.values(gamma)).toEqual([1, 1, 1, 1, 1, 1, 1])
  })

  it("are within 0.35 % of Davies 1962 for bicarbonate up to 0.01 mol/L, another published equation", () => {
    for (const i of [0.0005, 0.001, 0.002, 0.005, 0.01]) {
      const root = Math.sqrt(i)
      const davies = 10 ** (-0.5092 * (root / (1 + root) - 0.3 * i))
      const { hco3 } = activityCoefficients({ temperature_c: 25, ionic_strength_mol_l: i })
      expect(Math.abs(hco3 / davies - 1)).toBeLessThan(0.0035)
    }
  })
})
