import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { waterQuantities } from "@/lib/units/quantities-water"
import type { Answer, Caution } from "./answer"
import { phAtCo2, speciesAtPh } from "./carbonate"
import { carbonateCautions, livestockCautions, upperBoundOnly } from "./carbonate-cautions"
import { carbonateMethod, degassedPh, prepare, type WaterInput, waterAssumptions } from "./carbonate-water"
import { type IonicStrength, MODEL_SIGMA } from "./ionic-strength"
import { type Co2Level, co2Level } from "./level"
import {
  COVERAGE_95,
  type Co2Cause,
  type Co2Interval,
  co2Interval,
  co2Spread,
  khMayBeNone,
  type LogNormal,
  sensitivities,
} from "./uncertainty"

export interface PhForCo2Input extends WaterInput {
  readonly co2_mg_l: number
  readonly kh_dkh: number
  readonly ph_error: number
  readonly kh_error_dkh: number
}

/** `ph` is the controller's set-point; the CO2 interval and the level are of a tank that is held there. */
export interface PhResult extends Co2Interval, IonicStrength {
  readonly ph: number
  readonly ph_low: number
  readonly ph_high: number
  readonly degassed_ph: number
  readonly ph_drop: number
  readonly level: Co2Level
}

export interface PhUncertainty extends LogNormal<Co2Cause> {
  /** Standard error of the set-point. */
  readonly ph_sigma: number
}

/**
 * The pH at which a water of a carbonate hardness holds an amount of CO2: the set-point of a pH controller. Its
 * interval is where the meter may stand when the water truly holds that much.
 *
 * Equations, sources and accuracy: `carbonateSystem`, `sensitivities`. Throws `OutOfDomain` on the field to change.
 */
export function phForCo2(input: PhForCo2Input): Answer<PhResult, PhUncertainty> {
  const { co2_mg_l, kh_dkh } = input
  const { system, ionic } = prepare(input)
  const ph = phAtCo2(system, input)
  requireModelRange(ph, input)
  const species = withFields({ ph: "co2_mg_l" }, () => speciesAtPh(system, { ph, kh_dkh }))
  const slope = sensitivities(system, { ph, kh_dkh }, species)
  const spread = co2Spread(slope, input, MODEL_SIGMA[ionic.ionic_strength_source])
  const ph_sigma = spread.sigma_ln / Math.abs(slope.ph)
  const interval = co2Interval(system, co2_mg_l, spread.sigma_ln)
  const upperOnly = khMayBeNone(input)
  const degassed_ph = degassedPh(system, input)
  return {
    result: {
      ph,
      ph_low: ph - COVERAGE_95 * ph_sigma,
      ph_high: ph + COVERAGE_95 * ph_sigma,
      degassed_ph,
      ph_drop: degassed_ph - ph,
      co2_low_mg_l: upperOnly ? 0 : interval.co2_low_mg_l,
      co2_high_mg_l: interval.co2_high_mg_l,
      level: co2Level(interval.co2_high_mg_l),
      ...ionic,
    },
    uncertainty: { ...spread, ph_sigma },
    cautions: [
      ...livestockCautions(system, interval),
      calibrateProbe,
      ...(degassed_ph < ph ? [belowAir(degassed_ph)] : []),
      ...(upperOnly ? [upperBoundOnly(kh_dkh, input.kh_error_dkh)] : []),
      ...carbonateCautions({ water: input, ph, kh_dkh, system, species }),
    ],
    assumptions: waterAssumptions(input, ionic),
    method: carbonateMethod("pH set-point for a CO2 level", input, ionic),
  }
}

function requireModelRange(ph: number, { co2_mg_l, kh_dkh }: PhForCo2Input): void {
  const { min, max } = waterQuantities.ph
  if (ph >= min && ph <= max) return
  throw new OutOfDomain(
    "co2_mg_l",
    `${figures(co2_mg_l, 3)} mg/L CO2 at ${figures(kh_dkh, 3)} dKH needs pH ${figures(ph, 3)}, outside ${min} to ${max}. Ask for ${ph > max ? "more" : "less"} CO2, or check KH.`,
  )
}

const calibrateProbe: Caution = {
  code: "calibrate_probe",
  severity: "warning",
  message:
    "A probe that is off by 0.1 changes CO2 by 26 %; off by 0.3 it doubles or halves it. Calibrate at tank temperature before you set the controller, check with a drop checker, and limit how long the valve may stay open.",
}

function belowAir(degassed_ph: number): Caution {
  return {
    code: "below_air",
    severity: "warning",
    message: `The air alone keeps this water at pH ${degassed_ph.toFixed(2)}, with more CO2 than you ask for. A controller set there would never open the valve.`,
  }
}
