import fc from "fast-check"
import { describe, expect, it } from "vitest"
import {
  airPco2Atm,
  carbonateSystem,
  co2AtPh,
  co2AtPressure,
  khAtCo2,
  phAtCo2,
  speciesAtPh,
} from "@/lib/chemistry/carbonate"
import { ionicStrengthOfReference } from "@/lib/chemistry/ionic-strength"
import { OutOfDomain } from "@/lib/units/out-of-domain"

/** Sodium bicarbonate in demineralised water. */
const reference = (temperature_c: number, kh_dkh: number) =>
  carbonateSystem({ temperature_c, ionic_strength_mol_l: ionicStrengthOfReference(kh_dkh) })

const double = (min: number, max: number) => fc.double({ min, max, noNaN: true })

const water = fc.record({
  temperature_c: double(0, 50),
  ionic_strength_mol_l: double(0, 0.05),
  phosphate_mg_l: fc.oneof(fc.constant(0), double(0, 50)),
  kh_dkh: double(0.1, 30),
})

describe("the worked example at 25 °C, 4 dKH, pH 6.8, ionic strength as alkalinity", () => {
  // Worked out by hand from the published equations; PHREEQC gives 21.4310 mg/L.
  const species = speciesAtPh(reference(25, 4), { ph: 6.8, kh_dkh: 4 })
  it.each([
    ["h", 1.64462e-7, 6],
    ["oh", 6.64593e-8, 6],
    ["carbonateAlkalinity", 1.42670784e-3, 9],
    ["hco3", 1.42575182e-3, 9],
    ["co3", 4.780107e-7, 7],
    ["co2", 4.87243251e-4, 9],
    ["pco2_atm", 14357.058e-6, 8],
  ] as const)("gives %s as %d to %i digits", (name, expected, digits) => {
    expect(species[name].toPrecision(digits)).toBe(expected.toPrecision(digits))
  })

  it("gives 21.443332 mg/L", () => {
    expect(Math.abs(co2AtPh(reference(25, 4), { ph: 6.8, kh_dkh: 4 }) / 21.443332 - 1)).toBeLessThan(1e-6)
  })
})

describe("water in balance with the air", () => {
  it.each([
    [425, 1, 7.746],
    [425, 2, 8.041],
    [425, 4, 8.332],
    [425, 8, 8.617],
    [425, 16, 8.89],
    [1000, 1, 7.377],
    [1000, 2, 7.673],
    [1000, 4, 7.967],
    [1000, 8, 8.256],
    [1000, 16, 8.539],
  ])("with %d ppm CO2 and %d dKH has pH %d at 25 °C", (air_co2_ppm, kh_dkh, expected) => {
    const system = reference(25, kh_dkh)
    const co2_mg_l = co2AtPressure(system, airPco2Atm({ air_co2_ppm, temperature_c: 25 }))
    expect(Math.abs(phAtCo2(system, { co2_mg_l, kh_dkh }) - expected)).toBeLessThan(0.0006)
  })

  it.each([
    [10, 425, 0.993],
    [15, 425, 0.838],
    [20, 425, 0.715],
    [25, 425, 0.615],
    [30, 425, 0.533],
    [35, 425, 0.465],
    [25, 800, 1.16],
    [25, 1000, 1.45],
    [25, 1500, 2.17],
  ])("at %d °C and %d ppm holds %d mg/L", (temperature_c, air_co2_ppm, expected) => {
    const system = carbonateSystem({ temperature_c, ionic_strength_mol_l: 0.002 })
    const co2 = co2AtPressure(system, airPco2Atm({ air_co2_ppm, temperature_c }))
    expect(Math.abs(co2 - expected)).toBeLessThan(expected > 1 ? 0.0055 : 0.00095)
  })

  it("holds less at altitude, in proportion to the dry pressure", () => {
    const air = { air_co2_ppm: 425, temperature_c: 25 }
    const denver = airPco2Atm({ ...air, altitude_m: 1600 }) / airPco2Atm(air)
    // ISO 2533: 83.52 kPa at 1,600 m; vapour pressure 3.166 kPa at 25 °C.
    expect(denver).toBeCloseTo((83.52 - 3.166) / (101.325 - 3.166), 3)
  })
})

describe("a reference solution of 4 dKH at 25 °C", () => {
  it.each([
    [6.0, 135.5],
    [6.2, 85.4],
    [6.4, 53.9],
    [6.5, 42.8],
    [6.6, 34.0],
    [6.65, 30.3],
    [6.7, 27.0],
    [6.8, 21.4],
    [6.9, 17.0],
    [7.0, 13.5],
    [7.2, 8.5],
    [7.4, 5.4],
    [7.6, 3.4],
  ])("at pH %d holds %d mg/L", (ph, expected) => {
    expect(co2AtPh(reference(25, 4), { ph, kh_dkh: 4 }).toFixed(1)).toBe(expected.toFixed(1))
  })

  it.each([
    [15, 6.722],
    [20, 6.684],
    [25, 6.654],
    [30, 6.63],
  ])("holds 30 mg/L at %d °C at pH %d", (t, expected) => {
    expect(Math.abs(phAtCo2(reference(t, 4), { co2_mg_l: 30, kh_dkh: 4 }) - expected)).toBeLessThan(0.0006)
  })

  it.each([
    [1, 6.062],
    [2, 6.359],
    [3, 6.532],
    [5, 6.749],
  ])("of %d dKH instead holds 30 mg/L at pH %d", (kh, expected) => {
    expect(Math.abs(phAtCo2(reference(25, kh), { co2_mg_l: 30, kh_dkh: kh }) - expected)).toBeLessThan(0.0006)
  })
})

describe("the rule CO2 = 3 · KH · 10^(7 - pH)", () => {
  // Error of the rule against PHREEQC in per cent, sodium bicarbonate water at pH 6.8; KH 0.5, 1, 2, 4, 8, 15, 30.
  it.each([
    [10, -33, -33, -32, -31, -30, -29, -27],
    [15, -26, -26, -25, -24, -23, -21, -19],
    [20, -19, -19, -18, -17, -16, -14, -12],
    [22, -17, -17, -16, -15, -13, -12, -9],
    [24, -15, -14, -13, -12, -11, -9, -7],
    [25, -14, -13, -12, -11, -10, -8, -5],
    [26, -13, -12, -11, -10, -9, -7, -4],
    [28, -11, -10, -9, -8, -7, -5, -2],
    [30, -9, -8, -7, -6, -5, -3, 0],
    [35, -5, -4, -3, -2, -1, 2, 5],
  ])("at %d °C is off by what PHREEQC says", (t, ...errors) => {
    for (const [i, kh] of [0.5, 1, 2, 4, 8, 15, 30].entries()) {
      const rule = 3 * kh * 10 ** 0.2
      const error = (rule / co2AtPh(reference(t, kh), { ph: 6.8, kh_dkh: kh }) - 1) * 100
      expect(Math.abs(error - errors[i]!)).toBeLessThan(1)
    }
  })

  it.each([
    [10, 4.38],
    [15, 3.95],
    [20, 3.62],
    [22, 3.52],
    [24, 3.42],
    [25, 3.38],
    [26, 3.34],
    [28, 3.27],
    [30, 3.2],
    [35, 3.07],
  ])("would need %d °C -> factor %d at 4 dKH", (t, factor) => {
    const exact = co2AtPh(reference(t, 4), { ph: 6.8, kh_dkh: 4 }) / (4 * 10 ** 0.2)
    expect(Math.abs(exact - factor)).toBeLessThan(0.0075)
  })
})

describe("phosphate", () => {
  // Over-reading of CO2 when it is ignored, in per cent at 25 °C: PO4, then pH 6.4, 6.8, 7.2 at 2 dKH and at 4 dKH.
  it.each([
    [1, "0.2 0.4 0.8", "0.1 0.2 0.4"],
    [5, "1.1 2.3 4.0", "0.6 1.1 2.0"],
    [20, "4.5 9.7 18", "2.3 4.8 8.4"],
    [50, "12 28 62", "6 13 24"],
  ])("of %d mg/L is corrected for by what the published constants say", (phosphate_mg_l, at2, at4) => {
    for (const [kh_dkh, shown] of [
      [2, at2],
      [4, at4],
    ] as const) {
      const ionic_strength_mol_l = ionicStrengthOfReference(kh_dkh)
      const plain = carbonateSystem({ temperature_c: 25, ionic_strength_mol_l })
      const corrected = carbonateSystem({ temperature_c: 25, ionic_strength_mol_l, phosphate_mg_l })
      const over = [6.4, 6.8, 7.2].map(
        (ph) => (co2AtPh(plain, { ph, kh_dkh }) / co2AtPh(corrected, { ph, kh_dkh }) - 1) * 100,
      )
      shown.split(" ").forEach((text, i) => {
        expect(Math.abs(over[i]! - Number(text))).toBeLessThan(text.includes(".") ? 0.1 : 1)
      })
    }
  })
})

describe("round trips", () => {
  it("pH -> CO2 -> pH and pH -> CO2 -> KH return within 1e-8", () => {
    let solved = 0
    fc.assert(
      fc.property(water, double(4, 9.5), ({ kh_dkh, ...rest }, ph) => {
        const system = carbonateSystem(rest)
        const co2_mg_l = orUndefined(() => co2AtPh(system, { ph, kh_dkh }))
        if (co2_mg_l === undefined) return
        solved++
        const back = co2AtPh(system, { ph: phAtCo2(system, { co2_mg_l, kh_dkh }), kh_dkh })
        expect(Math.abs(back / co2_mg_l - 1)).toBeLessThan(1e-8)
        expect(Math.abs(khAtCo2(system, { co2_mg_l, ph }) / kh_dkh - 1)).toBeLessThan(1e-8)
      }),
      { numRuns: 1000 },
    )
    expect(solved).toBeGreaterThan(500)
  })

  it("CO2 -> pH -> CO2 returns within 1e-8 from 1 mg/L to the solubility of the pure gas", () => {
    fc.assert(
      fc.property(water, double(0, 1), ({ kh_dkh, ...rest }, share) => {
        const system = carbonateSystem(rest)
        const co2_mg_l = 1 + share * (0.99 * co2AtPressure(system, 1) - 1)
        const back = co2AtPh(system, { ph: phAtCo2(system, { co2_mg_l, kh_dkh }), kh_dkh })
        expect(Math.abs(back / co2_mg_l - 1)).toBeLessThan(1e-8)
      }),
      { numRuns: 1000 },
    )
  })

  it("finds a pH for water without any CO2, and one without any KH", () => {
    const system = reference(25, 4)
    // Sodium hydroxide of 1.42661 mmol/L: pH = 14 - pOH with the activity of OH-.
    expect(phAtCo2(system, { co2_mg_l: 0, kh_dkh: 4 })).toBeCloseTo(
      -Math.log10(system.ohFactor / 1.42660984e-3),
      6,
    )
    // Rain in balance with 10^-3.5 atm, a textbook's 5.66 (Stumm & Morgan, open system).
    const pure = carbonateSystem({ temperature_c: 25, ionic_strength_mol_l: 0 })
    expect(phAtCo2(pure, { co2_mg_l: co2AtPressure(pure, 10 ** -3.5), kh_dkh: 0 })).toBeCloseTo(5.66, 2)
  })
})

describe("CO2 at a pH", () => {
  const tank = fc.record({
    temperature_c: double(5, 40),
    ionic_strength_mol_l: double(0.0005, 0.03),
    ph: double(5.8, 7.8),
    kh_dkh: double(1, 20),
  })
  const co2 = (w: { temperature_c: number; ionic_strength_mol_l: number; ph: number; kh_dkh: number }) =>
    orUndefined(() => co2AtPh(carbonateSystem(w), w))

  it.each([
    ["falls with pH", { ph: 0.01 }, -1],
    ["rises with KH", { kh_dkh: 0.05 }, 1],
    ["falls with temperature", { temperature_c: 0.2 }, -1],
    ["falls with ionic strength", { ionic_strength_mol_l: 0.0005 }, -1],
  ] as const)("%s", (_, change, sign) => {
    fc.assert(
      fc.property(tank, (w) => {
        const moved = { ...w }
        for (const [name, by] of Object.entries(change)) moved[name as keyof typeof w] += by
        const [before, after] = [co2(w), co2(moved)]
        if (before !== undefined && after !== undefined) expect(Math.sign(after - before)).toBe(sign)
      }),
    )
  })

  it("refuses a KH that is all hydroxide, naming KH, and a CO2 above the pure gas, naming pH", () => {
    const refused = (w: { ph: number; kh_dkh: number }) => {
      try {
        return speciesAtPh(reference(25, w.kh_dkh), w)
      } catch (error) {
        return error instanceof OutOfDomain ? error.field : error
      }
    }
    expect(refused({ ph: 9.5, kh_dkh: 0.05 })).toBe("kh_dkh")
    expect(refused({ ph: 4.5, kh_dkh: 8 })).toBe("ph")
  })

  it("dissolves pure gas at 1 atm and 25 °C to the 1.50 g/L of the CRC Handbook (mole fraction 0.000615)", () => {
    const system = carbonateSystem({ temperature_c: 25, ionic_strength_mol_l: 0 })
    expect(Math.abs(co2AtPressure(system, 1) / 1499 - 1)).toBeLessThan(0.007)
  })
})

function orUndefined(run: () => number): number | undefined {
  try {
    return run()
  } catch (error) {
    if (error instanceof OutOfDomain) return undefined
    throw error
  }
}
