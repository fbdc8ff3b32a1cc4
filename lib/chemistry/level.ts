import type { Severity } from "./answer"

export const co2Levels = ["low", "in_range", "high", "dangerous"] as const
export type Co2Level = (typeof co2Levels)[number]

/** One band of CO2 for livestock, up to and including a concentration. */
export interface Co2Band {
  readonly up_to_mg_l: number
  readonly level: Co2Level
  readonly severity: Severity
}

/**
 * The product's bands. No controlled dose-response is published for ornamental fish or shrimp, so they are a
 * judgement: 20 to 30 mg/L is the usual target of planted tanks (common practice, no source), 30 to 40 asks for
 * caution, above 40 we warn and above 60 we alarm. Behind them: warm-water fish should not live above 20 to 30 for
 * long (wedemeyer1996); first deaths within a day are recorded from 150 mg/L (treanor2020).
 */
export const co2Bands: readonly Co2Band[] = [
  { up_to_mg_l: 20, level: "low", severity: "info" },
  { up_to_mg_l: 30, level: "in_range", severity: "info" },
  { up_to_mg_l: 40, level: "in_range", severity: "info" },
  { up_to_mg_l: 60, level: "high", severity: "warning" },
  { up_to_mg_l: Number.POSITIVE_INFINITY, level: "dangerous", severity: "danger" },
]

/**
 * The band of a water from the UPPER end of its 95 % interval, so that an uncertain reading never looks safer than
 * it is: 26 mg/L that may be 44 is `high`. `low` therefore means "surely not more than 20".
 */
export function co2Band(co2_high_mg_l: number): Co2Band {
  return co2Bands.find((band) => co2_high_mg_l <= band.up_to_mg_l) ?? co2Bands[co2Bands.length - 1]!
}

export function co2Level(co2_high_mg_l: number): Co2Level {
  return co2Band(co2_high_mg_l).level
}
