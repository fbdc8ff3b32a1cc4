import { CO2_MG_PER_MOL } from "@/lib/units/chemistry"
import { figures } from "@/lib/units/figures"
import type { Answer, Caution } from "./answer"
import { airPco2Atm, speciesAtPh } from "./carbonate"
import { carbonateCautions, livestockCautions, upperBoundOnly } from "./carbonate-cautions"
import { carbonateMethod, degassedPh, prepare, type WaterInput, waterAssumptions } from "./carbonate-water"
import { type IonicStrength, MODEL_SIGMA } from "./ionic-strength"
import { type Co2Level, co2Level } from "./level"
import {
  type Co2Cause,
  type Co2Interval,
  co2Interval,
  co2Spread,
  khMayBeNone,
  type LogNormal,
  sensitivities,
} from "./uncertainty"

export interface Co2FromPhInput extends WaterInput {
  readonly ph: number
  readonly kh_dkh: number
  readonly ph_error: number
  readonly kh_error_dkh: number
}

export interface Co2Result extends Co2Interval, IonicStrength {
  readonly co2_mg_l: number
  readonly level: Co2Level
  readonly hco3_mmol_l: number
  readonly co3_mmol_l: number
  readonly dic_mmol_l: number
  readonly pco2_uatm: number
  readonly saturation_ratio: number
  readonly degassed_ph: number
}

export interface Co2Uncertainty extends LogNormal<Co2Cause> {
  readonly co2_low_68_mg_l: number
  readonly co2_high_68_mg_l: number
}

/**
 * CO2 of a water from its pH and carbonate hardness, with the 95 % interval, the level by its upper end, the other
 * carbonate species, and the pH that the water would degas to. The lower end is 0, the only sure bound, where KH
 * could as well be none.
 *
 * Equations, sources and accuracy: `carbonateSystem`, `sensitivities`. Throws `OutOfDomain` on the field to change.
 */
export function co2FromPh(input: Co2FromPhInput): Answer<Co2Result, Co2Uncertainty> {
  const { ph, kh_dkh } = input
  const { system, ionic } = prepare(input)
  const species = speciesAtPh(system, input)
  const co2_mg_l = species.co2 * CO2_MG_PER_MOL
  const slope = sensitivities(system, input, species)
  const spread = co2Spread(slope, input, MODEL_SIGMA[ionic.ionic_strength_source])
  const interval = co2Interval(system, co2_mg_l, spread.sigma_ln)
  const interval68 = co2Interval(system, co2_mg_l, spread.sigma_ln, 1)
  const upperOnly = khMayBeNone(input)
  return {
    result: {
      co2_mg_l,
      co2_low_mg_l: upperOnly ? 0 : interval.co2_low_mg_l,
      co2_high_mg_l: interval.co2_high_mg_l,
      level: co2Level(interval.co2_high_mg_l),
      hco3_mmol_l: species.hco3 * 1000,
      co3_mmol_l: species.co3 * 1000,
      dic_mmol_l: (species.co2 + species.hco3 + species.co3) * 1000,
      pco2_uatm: species.pco2_atm * 1e6,
      saturation_ratio: species.pco2_atm / airPco2Atm(input),
      degassed_ph: degassedPh(system, input),
      ...ionic,
    },
    uncertainty: {
      ...spread,
      co2_low_68_mg_l: upperOnly ? 0 : interval68.co2_low_mg_l,
      co2_high_68_mg_l: interval68.co2_high_mg_l,
    },
    cautions: [
      ...livestockCautions(system, interval),
      ...(upperOnly ? [upperBoundOnly(kh_dkh, input.kh_error_dkh)] : []),
      ...carbonateCautions({ water: input, ph, kh_dkh, system, species }),
      commonChart(input, co2_mg_l),
    ],
    assumptions: waterAssumptions(input, ionic),
    method: carbonateMethod("CO2 from pH and carbonate hardness", input, ionic),
  }
}

/** The chart of the trade, 3 · KH · 10^(7 - pH), beside the result. Common practice, no source. */
function commonChart({ ph, kh_dkh }: Co2FromPhInput, co2_mg_l: number): Caution {
  const chart = 3 * kh_dkh * 10 ** (7 - ph)
  const error = chart / co2_mg_l - 1
  return {
    code: "common_chart",
    severity: "info",
    message: `The common chart (3 × KH × 10^(7 - pH)) would say ${figures(chart, 2)} mg/L, ${figures(Math.abs(error) * 100, 2)} % ${error < 0 ? "less" : "more"}: it leaves out temperature and ionic strength.`,
  }
}
