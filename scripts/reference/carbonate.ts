import { debyeHuckel } from "@/lib/chemistry/activity"
import {
  airPco2Atm,
  type CarbonateSystem,
  carbonateSystem,
  co2AtPressure,
  phAtCo2,
  speciesAtPh,
} from "@/lib/chemistry/carbonate"
import { logHenry, logK1, logK2, logKw } from "@/lib/chemistry/constants"
import { ionicStrength, ionicStrengthOfReference, type WaterReadings } from "@/lib/chemistry/ionic-strength"
import { dielectric, waterDensity, waterDensityKgL, waterVapourPressureAtm } from "@/lib/chemistry/water"
import { ALKALINITY_MOL_L_PER_DKH, CACO3_MG_L_PER_DKH, CO2_MG_PER_MOL } from "@/lib/units/chemistry"
import {
  BadRow,
  type Deviation,
  deviation,
  number,
  optionalNumber,
  parseTolerance,
  type ReferenceFormat,
  type Row,
  relativeTo,
  type Tolerance,
  within,
} from "./format"

/** Rows made by PHREEQC: whole waters. Tolerances are those of the model's specification, none is fitted to a row. */
export const carbonate: ReferenceFormat = {
  name: "carbonate system by PHREEQC",
  recognises: (header) => ["kind", "kh_dkh", "co2_mg_l", "ec25_us_cm"].every((name) => header.includes(name)),
  check(row) {
    switch (row.kind) {
      case "forward_nahco3":
        return forwardSoft(row)
      case "forward_phosphate":
        return forwardPhosphate(row)
      case "forward_hard":
        return forwardHard(row)
      case "inverse_ph":
        return [setPoint(row)]
      case "degassed_ph":
        return [degassed(row)]
      default:
        throw new BadRow(`unknown kind: ${row.kind}`)
    }
  },
}

/** Single published numbers: constants, solubilities, a farm table. Each row brings its own tolerance. */
export const carbonatePublished: ReferenceFormat = {
  name: "published constants of the carbonate system",
  recognises: (header) =>
    ["quantity", "condition", "value", "tolerance"].every((name) => header.includes(name)),
  check(row) {
    const compute = published[row.quantity ?? ""]
    if (!compute) throw new BadRow(`unknown quantity: ${row.quantity}`)
    const temperature_c = number(row, "temperature_c")
    return [
      deviation(
        {
          kind: "published",
          quantity: row.quantity!,
          expected: number(row, "value"),
          actual: compute(temperature_c, row.condition ?? ""),
        },
        parseTolerance(row.tolerance ?? "", temperature_c),
      ),
    ]
  },
}

function forwardSoft(row: Row): Deviation[] {
  const species = forward(row, { ionic_strength_mol_l: number(row, "ionic_strength_mol_l") })
  const alkalinity = number(row, "kh_dkh") * ALKALINITY_MOL_L_PER_DKH
  // Where hydroxide is a large part of the alkalinity the two models' ion products of water tell, and an error of
  // the activity of OH- counts as many times as alkalinity exceeds carbonate.
  const hydroxide = species.oh / alkalinity > 0.1
  const leverage = hydroxide ? alkalinity / species.carbonateAlkalinity : 1
  const deviations = [
    compare(row, "co2_mg_l", species.co2_mg_l, relativeTo(hydroxide ? 0.02 : 0.007)),
    compare(row, "hco3_mmol_l", species.hco3_mmol_l, relativeTo(0.007)),
    compare(row, "co3_mmol_l", species.co3_mmol_l, relativeTo(0.007)),
    compare(row, "pco2_uatm", species.pco2_uatm, relativeTo(hydroxide ? 0.02 : 0.007)),
    compare(row, "dic_mmol_l", species.dic_mmol_l, relativeTo(0.003)),
    estimated(row, "KH", {}, relativeTo(0.05 * leverage)),
  ]
  const conductivity_us_cm = optionalNumber(row, "ec25_us_cm")
  if (conductivity_us_cm !== undefined) {
    deviations.push(estimated(row, "conductivity", { conductivity_us_cm }, relativeTo(0.025 * leverage)))
  }
  return deviations
}

function forwardPhosphate(row: Row): Deviation[] {
  const species = forward(row, { ionic_strength_mol_l: number(row, "ionic_strength_mol_l") })
  return [compare(row, "co2_mg_l", species.co2_mg_l, relativeTo(0.003))]
}

function forwardHard(row: Row): Deviation[] {
  const alkaline = number(row, "ph") > 7.8
  const tolerance = relativeTo(alkaline ? 0.04 : 0.025)
  const species = forward(row, { ionic_strength_mol_l: number(row, "ionic_strength_mol_l") })
  const deviations = [
    compare(row, "co2_mg_l", species.co2_mg_l, tolerance),
    compare(row, "pco2_uatm", species.pco2_uatm, tolerance),
  ]
  if (alkaline) return deviations
  deviations.push(estimated(row, "GH", { gh_dgh: number(row, "gh_dgh") }, relativeTo(0.06)))
  const conductivity_us_cm = optionalNumber(row, "ec25_us_cm")
  if (conductivity_us_cm !== undefined) {
    deviations.push(estimated(row, "conductivity", { conductivity_us_cm }, relativeTo(0.03)))
  }
  return deviations
}

function setPoint(row: Row): Deviation {
  const kh_dkh = number(row, "kh_dkh")
  const actual = phAtCo2(sodiumBicarbonate(row), { kh_dkh, co2_mg_l: number(row, "co2_target_mg_l") })
  return compare(row, "ph", actual, within(0.003))
}

function degassed(row: Row): Deviation {
  const system = sodiumBicarbonate(row)
  const { temperature_c } = system
  const air = airPco2Atm({ air_co2_ppm: number(row, "air_co2_ppm_dry"), temperature_c })
  const actual = phAtCo2(system, { kh_dkh: number(row, "kh_dkh"), co2_mg_l: co2AtPressure(system, air) })
  return compare(row, "ph", actual, within(0.003))
}

/** CO2 when the ionic strength has to be estimated from one reading. */
function estimated(
  row: Row,
  reading: string,
  given: Omit<WaterReadings, "kh_dkh">,
  tolerance: Tolerance,
): Deviation {
  const found = compare(row, "co2_mg_l", forward(row, given).co2_mg_l, tolerance)
  return { ...found, quantity: `co2_mg_l, ionic strength from ${reading}` }
}

function compare(row: Row, quantity: string, actual: number, tolerance: Tolerance): Deviation {
  return deviation({ kind: row.kind!, quantity, expected: number(row, quantity), actual }, tolerance)
}

function forward(row: Row, readings: Omit<WaterReadings, "kh_dkh">) {
  const kh_dkh = number(row, "kh_dkh")
  const system = carbonateSystem({
    temperature_c: number(row, "temperature_c"),
    ionic_strength_mol_l: ionicStrength({ kh_dkh, ...readings }).ionic_strength_mol_l,
    phosphate_mg_l: optionalNumber(row, "phosphate_mg_l"),
  })
  const { co2, hco3, co3, oh, carbonateAlkalinity, pco2_atm } = speciesAtPh(system, {
    ph: number(row, "ph"),
    kh_dkh,
  })
  return {
    co2_mg_l: co2 * CO2_MG_PER_MOL,
    hco3_mmol_l: hco3 * 1000,
    co3_mmol_l: co3 * 1000,
    dic_mmol_l: (co2 + hco3 + co3) * 1000,
    pco2_uatm: pco2_atm * 1e6,
    oh,
    carbonateAlkalinity,
  }
}

function sodiumBicarbonate(row: Row): CarbonateSystem {
  return carbonateSystem({
    temperature_c: number(row, "temperature_c"),
    ionic_strength_mol_l: ionicStrengthOfReference(number(row, "kh_dkh")),
  })
}

/** What the engine says for each published quantity, in the file's unit. */
const published: Readonly<Record<string, (temperature_c: number, condition: string) => number>> = {
  pK1: (t) => -logK1(t),
  pK2: (t) => -logK2(t),
  pKH: (t) => -logHenry(t),
  pKw: (t) => -logKw(t),
  K0: (t) => 10 ** logHenry(t) * waterDensityKgL(t),
  x_CO2: (t) => {
    const molal = 10 ** logHenry(t)
    return molal / (molal + 1000 / 18.015)
  },
  eps: (t) => dielectric(t),
  A_DH: (t) => debyeHuckel(t).a,
  rho: (t) => waterDensity(t),
  pH2O: (t) => waterVapourPressureAtm(t),
  co2_per_alk: (t, condition) => co2PerAlkalinity(t, numberIn(condition, /pH\s*([\d.]+)/)),
  co2_formula: (t, condition) =>
    numberIn(condition, /alk\w*\s+([\d.]+)/) * co2PerAlkalinity(t, numberIn(condition, /pH\s*([\d.]+)\s*$/)),
  pH: (t, condition) => {
    const system = carbonateSystem({ temperature_c: t, ionic_strength_mol_l: 0 })
    const pressure = 10 ** numberIn(condition, /10\^(-?[\d.]+)\s*atm/)
    return phAtCo2(system, {
      kh_dkh: numberIn(condition, /KH\s*([\d.]+)/),
      co2_mg_l: co2AtPressure(system, pressure),
    })
  },
}

/** mg/L of CO2 for each mg/L (as CaCO3) of bicarbonate alkalinity, in infinitely dilute water. */
function co2PerAlkalinity(temperature_c: number, ph: number): number {
  const { co2Factor } = carbonateSystem({ temperature_c, ionic_strength_mol_l: 0 })
  return (co2Factor * 10 ** -ph * CO2_MG_PER_MOL * ALKALINITY_MOL_L_PER_DKH) / CACO3_MG_L_PER_DKH
}

function numberIn(text: string, pattern: RegExp): number {
  const match = pattern.exec(text)
  if (!match) throw new BadRow(`condition not understood: ${text}`)
  return Number(match[1])
}
