import { ALKALINITY_MOL_L_PER_DKH } from "@/lib/units/chemistry"
import { type CarbonateSystem, co2AtPressure, phosphateAlkalinity, type Species } from "./carbonate"
import { logHenrySlope, logK1Slope } from "./constants"

/** Standard errors of ln(result) by where they come from; `sigma_ln` is their root sum of squares. */
export interface LogNormal<Cause extends string> {
  readonly distribution: "log-normal"
  readonly coverage: 0.95
  readonly sigma_ln: number
  readonly contributions: Readonly<Record<Cause, number>>
}

/** Standard normal deviate of the 95 % interval. */
export const COVERAGE_95 = 1.96

export function logNormal<Cause extends string>(
  contributions: Readonly<Record<Cause, number>>,
): LogNormal<Cause> {
  const values: number[] = Object.values(contributions)
  return { distribution: "log-normal", coverage: 0.95, sigma_ln: Math.hypot(...values), contributions }
}

/** How ln CO2 answers to each reading: per pH unit, per relative change of KH, per kelvin. */
export interface Sensitivities {
  readonly ph: number
  readonly kh: number
  readonly temperature: number
}

/**
 * First-order sensitivities of ln CO2 from pH and KH, from the derivatives of the equilibrium equations. The part of
 * KH that goes through the activity coefficients (at most 0.01) is left out.
 */
export function sensitivities(
  system: CarbonateSystem,
  { ph, kh_dkh }: { readonly ph: number; readonly kh_dkh: number },
  { h, oh, carbonateAlkalinity }: Species,
): Sensitivities {
  const a = 10 ** -ph
  const x = system.co3Factor / a
  // Alkalinity that changes hands with pH: water's own ions, and phosphate's second proton.
  const phosphate = (phosphateAlkalinity(system, a) * a) / (system.k2Phosphate + a)
  const buffered = (h + oh + phosphate) / carbonateAlkalinity
  return {
    ph: -Math.LN10 * (1 + (2 * x) / (1 + 2 * x) + buffered),
    kh: (kh_dkh * ALKALINITY_MOL_L_PER_DKH) / carbonateAlkalinity,
    temperature: -Math.LN10 * logK1Slope(system.temperature_c),
  }
}

/** What a reading of pH and KH brings to the error of ln CO2. */
export type Co2Cause = "ph" | "kh" | "temperature" | "model"

export interface ReadingErrors {
  readonly kh_dkh: number
  readonly ph_error: number
  readonly kh_error_dkh: number
  readonly temperature_error_c: number
}

/** Error of ln CO2 from the errors of its readings; `model` is that of the equations themselves. */
export function co2Spread(slope: Sensitivities, errors: ReadingErrors, model: number): LogNormal<Co2Cause> {
  return logNormal({
    ph: Math.abs(slope.ph) * errors.ph_error,
    kh: (slope.kh * errors.kh_error_dkh) / errors.kh_dkh,
    temperature: Math.abs(slope.temperature) * errors.temperature_error_c,
    model,
  })
}

/** The 95 % interval of CO2. Its upper end is never above what pure gas dissolves at 1 atm. */
export interface Co2Interval {
  readonly co2_low_mg_l: number
  readonly co2_high_mg_l: number
}

export function co2Interval(
  system: CarbonateSystem,
  co2_mg_l: number,
  sigma_ln: number,
  deviate = COVERAGE_95,
): Co2Interval {
  const factor = Math.exp(deviate * sigma_ln)
  return {
    co2_low_mg_l: co2_mg_l / factor,
    co2_high_mg_l: Math.min(co2_mg_l * factor, co2AtPressure(system, 1)),
  }
}

/** Whether KH could as well be none within its error: then only the upper end of an interval means something. */
export function khMayBeNone({
  kh_dkh,
  kh_error_dkh,
}: Pick<ReadingErrors, "kh_dkh" | "kh_error_dkh">): boolean {
  return kh_dkh - 2 * kh_error_dkh <= 0
}

/** Relative change per kelvin of the CO2 that water holds under a given air. */
export function airCo2TemperatureSensitivity(temperature_c: number): number {
  return Math.LN10 * logHenrySlope(temperature_c)
}
