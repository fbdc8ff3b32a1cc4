import { checkBounds } from "@/lib/units/bounds"
import { CO2_MG_PER_MOL } from "@/lib/units/chemistry"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { waterQuantities } from "@/lib/units/quantities-water"
import type { Answer, Assumption } from "./answer"
import { type CarbonateSystem, pco2Uatm, type Species, speciesAtPh } from "./carbonate"
import { livestockCautions, outsideDesignRange } from "./carbonate-cautions"
import { airCo2MgL, carbonateDefaults, carbonateMethod, systemOf, type WaterInput } from "./carbonate-water"
import { type IonicStrength, ionicStrength, MODEL_SIGMA } from "./ionic-strength"
import { type SolvedWater, solveKh } from "./kh-from-co2"
import { type Co2Level, co2Level } from "./level"
import { phDropCautions } from "./ph-drop-cautions"
import {
  airCo2TemperatureSensitivity,
  type Co2Interval,
  co2Interval,
  type LogNormal,
  logNormal,
  sensitivities,
} from "./uncertainty"

/** What `degassed_ph` was read in: a sample aerated to the end, or the tank itself before the gas goes on. */
export const baselines = ["aerated_sample", "tank_before_gas"] as const
export type Baseline = (typeof baselines)[number]

export const phDropDefaults = {
  temperature_c: carbonateDefaults.temperature_c,
  temperature_error_c: carbonateDefaults.temperature_error_c,
  air_co2_ppm: carbonateDefaults.air_co2_ppm,
  altitude_m: carbonateDefaults.altitude_m,
  baseline: "aerated_sample",
  /** A tank after a night without gas holds 2 to 4 mg/L. Common practice, no source. */
  baseline_co2_mg_l: 3,
  /** Two readings of one meter: its offset cancels, slope and drift stay. Common practice, no source. */
  ph_drop_error: 0.05,
  /** An aired room against outdoors. Common practice, no source. */
  air_co2_error_ppm: 100,
} as const

/** ln of the factor by which a resting tank differs from `baseline_co2_mg_l`: 2 to 4 around 3 mg/L. */
const RESTING_TANK_SIGMA = 0.35

export interface PhDropInput extends WaterInput {
  readonly tank_ph: number
  readonly degassed_ph: number
  readonly baseline: Baseline
  /** Counts with `tank_before_gas` alone. */
  readonly baseline_co2_mg_l: number
  /** Moves the answer by a few per cent; absent, it follows from `degassed_ph`. Given, it checks the method. */
  readonly kh_dkh?: number | undefined
  readonly ph_drop_error: number
  readonly air_co2_error_ppm: number
}

export interface PhDropResult extends Co2Interval, IonicStrength {
  readonly co2_mg_l: number
  readonly level: Co2Level
  readonly ph_drop: number
  /** CO2 of the water that `degassed_ph` was read in. */
  readonly baseline_co2_mg_l: number
  readonly pco2_uatm: number
  /** With KH alone: what pH and KH say, and that over `co2_mg_l`. */
  readonly kh_method_co2_mg_l?: number
  readonly method_ratio?: number
}

/**
 * CO2 of the tank from how far its pH lies below that of the same water without gas, both at tank temperature. The
 * meter's offset, K1 and most of KH cancel; what stays is how much CO2 the baseline water held.
 *
 * Equations, sources and accuracy: `carbonateSystem`. Throws `OutOfDomain` on the field to change.
 */
export function co2FromPhDrop(input: PhDropInput): Answer<PhDropResult, LogNormal<DropCause>> {
  checkBounds(input, waterQuantities)
  const { tank_ph, degassed_ph } = input
  const { kh_dkh, system, ionic } = waterOf(input)
  const tank = withFields({ ph: "tank_ph" }, () => speciesAtPh(system, { ph: tank_ph, kh_dkh }))
  const degassed = withFields({ ph: "degassed_ph" }, () => speciesAtPh(system, { ph: degassed_ph, kh_dkh }))
  const ph_drop = degassed_ph - tank_ph
  const baseline_co2_mg_l = baselineCo2MgL(system, input)
  const co2_mg_l = baseline_co2_mg_l * 10 ** ph_drop * (tank.hco3 / degassed.hco3)
  const pco2_uatm = pco2Uatm(system, co2_mg_l)
  requireDissolved(pco2_uatm, ph_drop)
  const perPh = sensitivities(system, { ph: degassed_ph, kh_dkh }, degassed).ph
  const spread = dropSpread(input, perPh, MODEL_SIGMA[ionic.ionic_strength_source])
  const interval = co2Interval(system, co2_mg_l, spread.sigma_ln)
  const check = khMethod(input, tank, co2_mg_l)
  return {
    result: {
      co2_mg_l,
      ...interval,
      level: co2Level(interval.co2_high_mg_l),
      ph_drop,
      baseline_co2_mg_l,
      pco2_uatm,
      ...check,
      ...ionic,
    },
    uncertainty: spread,
    cautions: [
      ...livestockCautions(system, interval),
      ...phDropCautions({ input, kh_dkh, system, tank, degassed, co2_mg_l, baseline_co2_mg_l, ...check }),
      ...outsideDesignRange({ water: input, kh_dkh, ph: tank_ph }),
    ],
    assumptions: assumptions(input, kh_dkh),
    method: carbonateMethod("CO2 from the pH drop", input, ionic),
  }
}

type DropCause = "ph_drop" | "baseline" | "temperature" | "model"

function dropSpread(input: PhDropInput, perPh: number, model: number): LogNormal<DropCause> {
  const { baseline, temperature_c, temperature_error_c, air_co2_error_ppm, air_co2_ppm } = input
  const aerated = baseline === "aerated_sample"
  const perKelvin = Math.abs(airCo2TemperatureSensitivity(temperature_c))
  return logNormal({
    ph_drop: Math.abs(perPh) * input.ph_drop_error,
    baseline: aerated ? air_co2_error_ppm / air_co2_ppm : RESTING_TANK_SIGMA,
    temperature: aerated ? perKelvin * temperature_error_c : 0,
    model,
  })
}

/** With KH given, the other method beside this one. */
function khMethod({ kh_dkh }: PhDropInput, tank: Species, co2_mg_l: number) {
  if (kh_dkh === undefined) return {}
  const kh_method_co2_mg_l = tank.co2 * CO2_MG_PER_MOL
  return { kh_method_co2_mg_l, method_ratio: kh_method_co2_mg_l / co2_mg_l }
}

function requireDissolved(pco2_uatm: number, ph_drop: number): void {
  if (pco2_uatm <= 1e6) return
  throw new OutOfDomain(
    "tank_ph",
    `A drop of ${ph_drop.toFixed(2)} would take more CO2 than pure gas can dissolve at 1 atm. Check both pH readings.`,
  )
}

function baselineCo2MgL(system: CarbonateSystem, input: PhDropInput): number {
  return input.baseline === "aerated_sample" ? airCo2MgL(system, input) : input.baseline_co2_mg_l
}

/** The water with its KH as given, or as `degassed_ph` and the baseline's CO2 tell it. */
function waterOf(input: PhDropInput): SolvedWater {
  const { kh_dkh, degassed_ph } = input
  if (kh_dkh !== undefined) {
    const ionic = ionicStrength({ ...input, kh_dkh })
    return { kh_dkh, ionic, system: systemOf(input, ionic) }
  }
  try {
    return solveKh(input, { ph: degassed_ph, co2MgL: (system) => baselineCo2MgL(system, input) })
  } catch (error) {
    if (!(error instanceof OutOfDomain) || error.field !== "ph") throw error
    throw new OutOfDomain(
      "degassed_ph",
      `No fresh water has pH ${degassed_ph} with the CO2 of that baseline unless its KH is far out. Aerate until the pH stands still and read again, or give kh_dkh.`,
    )
  }
}

function assumptions(input: PhDropInput, kh_dkh: number): Assumption[] {
  const list: Assumption[] = [
    {
      code: "same_water",
      message: "Both pH readings are of the same water, with the same meter, at the tank's temperature.",
    },
    input.baseline === "aerated_sample"
      ? {
          code: "aerated",
          message: `The sample was aerated until its pH stood still (hours to overnight) in air with ${input.air_co2_ppm} ppm CO2 at ${input.altitude_m} m above the sea.`,
        }
      : {
          code: "resting_tank",
          message: `The tank held ${input.baseline_co2_mg_l} mg/L CO2 before the gas went on, give or take a third.`,
        },
  ]
  if (input.kh_dkh === undefined) {
    list.push({
      code: "kh_from_degassed_ph",
      message: `No KH was given, so ${kh_dkh.toPrecision(2)} dKH was worked out from the degassed pH; it moves the answer by a few per cent.`,
    })
  }
  return list
}
