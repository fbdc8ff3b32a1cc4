import { checkBounds } from "@/lib/units/bounds"
import { CO2_MG_PER_MOL } from "@/lib/units/chemistry"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { waterQuantities } from "@/lib/units/quantities-water"
import type { Answer, Caution } from "./answer"
import { speciesAtPh } from "./carbonate"
import { outsideDesignRange } from "./carbonate-cautions"
import { carbonateMethod, systemOf, type WaterInput, waterAssumptions } from "./carbonate-water"
import { raiseSlowly } from "./cautions"
import { ionicStrength, MODEL_SIGMA } from "./ionic-strength"
import { type Co2Level, co2Level } from "./level"
import { co2Interval, co2Spread, sensitivities } from "./uncertainty"

export const MAX_GRID_CELLS = 2500

export interface Co2GridInput extends WaterInput {
  readonly ph_from: number
  readonly ph_to: number
  readonly ph_step: number
  readonly kh_from_dkh: number
  readonly kh_to_dkh: number
  readonly kh_step_dkh: number
  readonly ph_error: number
  readonly kh_error_dkh: number
}

export interface GridCell {
  readonly ph: number
  readonly co2_mg_l: number
  readonly level: Co2Level
}

export interface GridRow {
  readonly kh_dkh: number
  readonly cells: readonly GridCell[]
}

export interface Co2GridResult {
  readonly rows: readonly GridRow[]
}

/**
 * CO2 over a field of pH and carbonate hardness, with the level of each cell by the upper end of its interval.
 *
 * Equations, sources and accuracy: `carbonateSystem`. Throws `OutOfDomain` on the field to change, also when a single
 * cell could not exist: a table with holes would be read as one with safe holes.
 */
export function co2Grid(input: Co2GridInput): Answer<Co2GridResult> {
  checkBounds(input, waterQuantities)
  const phs = steps("ph", input.ph_from, input.ph_to, input.ph_step)
  const khs = steps("kh", input.kh_from_dkh, input.kh_to_dkh, input.kh_step_dkh)
  if (phs.length * khs.length > MAX_GRID_CELLS) {
    throw new OutOfDomain(
      "ph_step",
      `${phs.length} × ${khs.length} cells are more than ${MAX_GRID_CELLS}. Take larger steps of pH or KH, or a smaller range.`,
    )
  }
  const [khFirst, khLast] = [khs[0]!, khs[khs.length - 1]!]
  const ionic = ionicStrength({ ...input, kh_dkh: khFirst })
  return {
    result: { rows: khs.map((kh_dkh) => rowOf(input, kh_dkh, phs)) },
    uncertainty: {},
    cautions: [
      levelsByUpperBound(input),
      raiseSlowly,
      ...outsideDesignRange({ water: input, kh_dkh: khFirst, ph: phs[0]! }),
      ...outsideDesignRange({ water: input, kh_dkh: khLast, ph: phs[phs.length - 1]! }),
    ],
    assumptions: waterAssumptions(input, ionic, ionicStrength({ ...input, kh_dkh: khLast })),
    method: carbonateMethod("CO2 over pH and carbonate hardness", input, ionic),
  }
}

function rowOf(input: Co2GridInput, kh_dkh: number, phs: readonly number[]): GridRow {
  const ionic = ionicStrength({ ...input, kh_dkh })
  const system = systemOf(input, ionic)
  const model = MODEL_SIGMA[ionic.ionic_strength_source]
  const cells = phs.map((ph) => {
    const species = withFields({ ph: "ph_from", kh_dkh: "kh_from_dkh" }, () =>
      speciesAtPh(system, { ph, kh_dkh }),
    )
    const co2_mg_l = species.co2 * CO2_MG_PER_MOL
    const slope = sensitivities(system, { ph, kh_dkh }, species)
    const { sigma_ln } = co2Spread(slope, { ...input, kh_dkh }, model)
    return { ph, co2_mg_l, level: co2Level(co2Interval(system, co2_mg_l, sigma_ln).co2_high_mg_l) }
  })
  return { kh_dkh, cells }
}

/** The values from, from + step … up to `to`, without the dust of repeated addition. */
function steps(axis: "ph" | "kh", from: number, to: number, step: number): number[] {
  if (from > to) {
    const field = axis === "ph" ? "ph_to" : "kh_to_dkh"
    throw new OutOfDomain(field, `Must not be below ${from}, where the grid starts.`)
  }
  const count = Math.floor((to - from) / step + 1e-9) + 1
  return Array.from({ length: count }, (_, i) => Number((from + i * step).toFixed(9)))
}

function levelsByUpperBound({ ph_error, kh_error_dkh, temperature_error_c }: Co2GridInput): Caution {
  return {
    code: "levels_by_upper_bound",
    severity: "info",
    message: `Each level goes by the upper end of the 95 % interval, with errors of ${ph_error} pH, ${kh_error_dkh} dKH and ${temperature_error_c} °C. pH proves CO2 only where no other acid or buffer is at work.`,
  }
}
