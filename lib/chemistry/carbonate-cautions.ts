import { ALKALINITY_MOL_L_PER_DKH, PO4_MG_PER_MOL } from "@/lib/units/chemistry"
import { figures } from "@/lib/units/figures"
import type { Caution } from "./answer"
import { type CarbonateSystem, co2AtPressure, pco2Uatm, phosphateAlkalinity, type Species } from "./carbonate"
import type { WaterInput } from "./carbonate-water"
import { livestock, raiseSlowly } from "./cautions"
import type { Co2Interval } from "./uncertainty"

/** What a carbonate answer was computed from, for the flags on it. */
export interface Flagged {
  readonly water: WaterInput
  readonly ph: number
  readonly kh_dkh: number
  readonly system: CarbonateSystem
  readonly species: Species
}

/** mol/L of alkalinity that 1 mg/L of dissolved organic carbon holds near pH 6.6. @source oliverThurmanMalcolm1983 */
const ALKALINITY_PER_DOC = 3.3e-6

/** log K of boric acid and mol in 1 mg of boron. @source parkhurstAppelo2013, phreeqc.dat */
const LOG_K_BORIC = -9.24
const BORON_MOL_PER_MG = 1 / 10_811

/** Every condition under which "KH is carbonate hardness" or the model itself gets weaker, with its size here. */
export function carbonateCautions(at: Flagged): Caution[] {
  const flags = [
    acidOrHydroxide(at),
    lowKh(at),
    phosphate(at),
    organicAcids(at),
    borate(at),
    hardAndAlkaline(at),
    lowConductivity(at),
    noProof(at),
  ].filter((caution) => caution !== undefined)
  return [...outsideDesignRange(at), ...flags]
}

/** What every answer about CO2 shows about the animals, from the upper end of its interval. */
export function livestockCautions(system: CarbonateSystem, { co2_high_mg_l }: Co2Interval): Caution[] {
  const saturation = co2AtPressure(system, 1)
  const shared = [livestock({ co2_high_mg_l, pco2_uatm: pco2Uatm(system, co2_high_mg_l) }), raiseSlowly]
  if (co2_high_mg_l < saturation) return shared
  return [
    ...shared,
    {
      code: "no_upper_bound",
      severity: "warning",
      message: `These readings set no upper limit to CO2: the upper end shown, ${figures(saturation, 3)} mg/L, is what pure gas dissolves at 1 atm. Read pH and KH more exactly.`,
    },
  ]
}

/** A reading outside what tanks are kept at: none or one caution that names each. */
export function outsideDesignRange({
  water,
  kh_dkh,
  ph,
}: Pick<Flagged, "water" | "kh_dkh" | "ph">): Caution[] {
  const values = { temperature_c: water.temperature_c, kh_dkh, ph }
  const outside = (Object.keys(design) as (keyof typeof design)[])
    .filter((name) => values[name] < design[name][0] || values[name] > design[name][1])
    .map((name) => {
      const [from, to, unit] = design[name]
      return unit === "pH"
        ? `pH ${figures(ph, 3)} (designed for ${from} to ${to})`
        : `${figures(values[name], 3)} ${unit} (designed for ${from} to ${to} ${unit})`
    })
  if (outside.length === 0) return []
  return [
    {
      code: "outside_design_range",
      severity: "warning",
      message: `Outside the range of tank water that this is designed for: ${outside.join(", ")}. The equations still hold, but readings are harder to trust there.`,
    },
  ]
}

/** KH could as well be none within its error. */
export function upperBoundOnly(kh_dkh: number, kh_error_dkh: number): Caution {
  return {
    code: "upper_bound_only",
    severity: "warning",
    message: `KH of ${figures(kh_dkh, 3)} dKH with an error of ${figures(kh_error_dkh, 2)} dKH may as well be none, so only the upper bound means something. Titrate a larger sample to read KH more finely.`,
  }
}

/** The part of the temperature, KH and pH ranges that tanks are kept in and the model was checked over densely. */
const design = {
  temperature_c: [10, 35, "°C"],
  kh_dkh: [0.5, 20, "dKH"],
  ph: [5.8, 8.4, "pH"],
} as const

function acidOrHydroxide({ kh_dkh, species }: Flagged): Caution | undefined {
  const share = (species.h + species.oh) / (kh_dkh * ALKALINITY_MOL_L_PER_DKH)
  if (share <= 0.05) return undefined
  return {
    code: "acid_or_hydroxide",
    severity: "warning",
    message: `Free H+ and OH- make up ${percent(share)} of the alkalinity. They are accounted for, but the result hangs on a good pH reading.`,
  }
}

function lowKh({ kh_dkh }: Flagged): Caution | undefined {
  if (kh_dkh >= 1) return undefined
  return {
    code: "low_kh",
    severity: "warning",
    message: `At ${figures(kh_dkh, 2)} dKH a test's step of 0.5 dKH is ${percent(0.5 / kh_dkh)} of the reading, and its colour change over-reads by up to 0.08 dKH. Titrate a larger sample, or measure CO2 by a drop checker or the pH drop.`,
  }
}

function phosphate({ water, ph, system, species }: Flagged): Caution | undefined {
  const { phosphate_mg_l = 0 } = water
  if (phosphate_mg_l <= 5) return undefined
  const share = phosphateAlkalinity(system, 10 ** -ph) / species.carbonateAlkalinity
  return {
    code: "phosphate",
    severity: "warning",
    message: `${figures(phosphate_mg_l, 3)} mg/L phosphate holds part of the KH. It is corrected for; without that CO2 would read ${percent(share)} too high. A phosphate pH buffer makes the pH and KH method unreliable: use a drop checker.`,
  }
}

function organicAcids({ water, species }: Flagged): Caution | undefined {
  const { doc_mg_l = 0 } = water
  if (doc_mg_l <= 5) return undefined
  const share = (doc_mg_l * ALKALINITY_PER_DOC) / species.carbonateAlkalinity
  return {
    code: "organic_acids",
    severity: "warning",
    message: `The acids of ${figures(doc_mg_l, 2)} mg/L dissolved organic carbon are titrated as KH: CO2 is over-read by about ${percent(share)}. It is not corrected for. Use a drop checker.`,
  }
}

function borate({ ph, species }: Flagged): Caution | undefined {
  if (ph < 8) return undefined
  const k = 10 ** LOG_K_BORIC
  const alkalinity = (BORON_MOL_PER_MG * k) / (k + 10 ** -ph)
  return {
    code: "borate",
    severity: "info",
    message: `Above pH 8 boron counts as alkalinity: 1 mg/L would hold ${figures(alkalinity * 1e6, 2)} µeq/L and make CO2 read ${percent(alkalinity / species.carbonateAlkalinity)} too high.`,
  }
}

function hardAndAlkaline({ water, ph }: Flagged): Caution | undefined {
  if (ph <= 7.8 || water.gh_dgh === undefined || water.gh_dgh <= 5) return undefined
  return {
    code: "hard_and_alkaline",
    severity: "warning",
    message: `At pH ${figures(ph, 3)} and ${figures(water.gh_dgh, 2)} dGH calcium and magnesium bind carbonate: CO2 is over-read by up to 3.3 %, and lime may come out of solution.`,
  }
}

function lowConductivity({ water }: Flagged): Caution | undefined {
  if (water.conductivity_us_cm === undefined || water.conductivity_us_cm >= 100) return undefined
  return {
    code: "low_conductivity",
    severity: "warning",
    message: `In water of ${figures(water.conductivity_us_cm, 2)} µS/cm a pH electrode drifts and is off by 0.05 to 0.3 (12 to 100 % in CO2). Let it settle, and give that as the pH error.`,
  }
}

function noProof({ water, ph, system, species }: Flagged): Caution {
  const tannins = shareOfKh(5 * ALKALINITY_PER_DOC, species)
  const phosphate = shareOfKh(
    phosphateAlkalinity({ ...system, phosphate_mol_l: 5 / PO4_MG_PER_MOL }, 10 ** -ph),
    species,
  )
  const unknown = water.phosphate_mg_l === undefined ? `, 5 mg/L of phosphate ${phosphate}` : ""
  return {
    code: "ph_is_no_proof",
    severity: "info",
    message: `A pH reading proves CO2 only where no other acid or buffer is at work. Here 5 mg/L of organic carbon from peat or driftwood would hold ${tannins} of the KH${unknown}, and CO2 would be over-read by as much. Check with a drop checker.`,
  }
}

function shareOfKh(alkalinity: number, { carbonateAlkalinity }: Species): string {
  const share = alkalinity / carbonateAlkalinity
  return share >= 1 ? "all" : percent(share)
}

function percent(share: number): string {
  return `${figures(share * 100, 2)} %`
}
