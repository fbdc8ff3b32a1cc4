import { type Answer, method } from "@/lib/chemistry/answer"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import { cylinderCautions } from "./cylinder-cautions"
import {
  type CylinderContents,
  type CylinderPhase,
  cylinderContents,
  cylinderState,
  liquidFullTemperature,
  maxFillRatio,
} from "./cylinder-state"
import { gasDefaults } from "./defaults"

/** One cylinder of those compared. */
export interface Cylinder {
  readonly name?: string | undefined
  readonly cylinder_mass_g: number
  /** CO2 still in it, by weighing. Absent: it is full. */
  readonly remaining_g?: number | undefined
  readonly fill_ratio_kg_l?: number | undefined
  readonly test_pressure_bar?: number | undefined
  readonly price?: number | undefined
  readonly refill_price?: number | undefined
}

/** Either one cylinder by its own fields, or several in `cylinders`. */
export interface CylinderInput extends Omit<Cylinder, "cylinder_mass_g"> {
  readonly daily_use_g_day: number
  readonly cylinder_mass_g?: number | undefined
  readonly cylinders?: readonly Cylinder[] | undefined
  readonly usable_fraction: number
  readonly ambient_c: number
  readonly cut_off_bar_abs: number
}

export interface CylinderLife extends CylinderContents {
  readonly name: string | null
  readonly cylinder_mass_g: number
  readonly days: number
  readonly days_low: number
  readonly days_high: number
  readonly refills_per_year: number
  /** `null` without the price of a refill, in whatever currency that was. */
  readonly cost_per_month: number | null
  /** `null` without both prices. */
  readonly first_year_cost: number | null
  readonly usable_g: number
  /** Of what is in it now. */
  readonly days_left: number
  readonly pressure_bar_abs: number
  readonly phase: CylinderPhase
  readonly liquid_present: boolean
  readonly fill_ratio_kg_l: number
  readonly max_fill_ratio_kg_l: number
  readonly fill_ratio_ok: boolean
  /** `null` for a fill that never becomes all liquid. */
  readonly liquid_full_c: number | null
}

/** The figures of the first cylinder, and of each. */
export interface CylinderComparison extends CylinderLife {
  readonly cylinders: readonly CylinderLife[]
}

/** Of the first cylinder; each row has its own. */
export type CylinderUncertainty = Pick<CylinderLife, "days_low" | "days_high">

/**
 * How long each cylinder lasts and costs at a daily use, and what its gauge shows.
 *
 * Pressure by spanWagner1996; the usable share leaves at least what stays behind at the cut-off pressure. Throws
 * `OutOfDomain` on the field to change.
 */
export function cylinderLife(input: CylinderInput): Answer<CylinderComparison, CylinderUncertainty> {
  checkBounds(input, quantities)
  const cylinders = cylindersOf(input).map((cylinder, i) => lifeOf(cylinder, input, fieldOf(input, i)))
  const [first] = cylinders
  return {
    result: { ...first!, cylinders },
    uncertainty: { days_low: first!.days_low, days_high: first!.days_high },
    cautions: cylinderCautions(cylinders, input),
    assumptions: [
      {
        code: "usable_share",
        message: `${figures(100 * input.usable_fraction, 3)} % of the charge reaches the tank, less where the gas left at ${figures(input.cut_off_bar_abs, 2)} bar weighs more than the rest. With a fifth lost to leaks and purging a charge lasts \`days_low\`, with none lost \`days_high\`.`,
      },
      {
        code: "fill",
        message: `Where the cylinder's stamps were not given: filled to ${gasDefaults.fill_ratio_kg_l} kg per litre of its water capacity, tested at ${gasDefaults.test_pressure_bar} bar.`,
      },
    ],
    method: method("Contents and pressure of a CO2 cylinder", [
      "spanWagner1996",
      "tsonopoulos1974",
      "adrP200",
      "cfr173304a",
    ]),
  }
}

/** Share of a charge that reaches the tank when leaks and purging take the most. Judgement: 10 to 20 % are lost. */
const LEAKY_FRACTION = 0.8

/** Days in the average month and year of the Gregorian calendar. */
const DAYS_PER_YEAR = 365.25
const DAYS_PER_MONTH = DAYS_PER_YEAR / 12

function cylindersOf(input: CylinderInput): readonly Cylinder[] {
  const { cylinders, cylinder_mass_g } = input
  if (cylinders !== undefined && cylinder_mass_g !== undefined) {
    throw new OutOfDomain("cylinders", "Give one cylinder by its mass or several in the list, not both.")
  }
  if (cylinder_mass_g !== undefined) return [{ ...input, cylinder_mass_g }]
  if (cylinders !== undefined && cylinders.length > 0) return cylinders
  throw new OutOfDomain("cylinder_mass_g", "Give the CO2 in the full cylinder, or a list of cylinders.")
}

function fieldOf(input: CylinderInput, index: number): (name: string) => string {
  return (name) => (input.cylinders === undefined ? name : `cylinders.${index}.${name}`)
}

function lifeOf(cylinder: Cylinder, input: CylinderInput, field: (name: string) => string): CylinderLife {
  requireSound(cylinder, field)
  const { cylinder_mass_g, price, refill_price, remaining_g = cylinder_mass_g } = cylinder
  const fill_kg_l = cylinder.fill_ratio_kg_l ?? gasDefaults.fill_ratio_kg_l
  const contents = cylinderContents({
    cylinder_mass_g,
    fill_kg_l,
    temperature_c: input.ambient_c,
    cut_off_bar_abs: input.cut_off_bar_abs,
  })
  const state = cylinderState({
    fill_kg_l: remaining_g / 1000 / contents.water_capacity_l,
    temperature_c: input.ambient_c,
  })
  const most = cylinder_mass_g - contents.residual_g
  const usable_g = Math.min(input.usable_fraction * cylinder_mass_g, most)
  const days = usable_g / input.daily_use_g_day
  const refills_per_year = DAYS_PER_YEAR / days
  const max_fill_ratio_kg_l = maxFillRatio(cylinder.test_pressure_bar ?? gasDefaults.test_pressure_bar)
  const priced = price !== undefined && refill_price !== undefined
  return {
    name: cylinder.name ?? null,
    cylinder_mass_g,
    days,
    days_low: Math.min(LEAKY_FRACTION * cylinder_mass_g, usable_g) / input.daily_use_g_day,
    days_high: most / input.daily_use_g_day,
    refills_per_year,
    cost_per_month: refill_price === undefined ? null : (refill_price * DAYS_PER_MONTH) / days,
    first_year_cost: priced ? price + refill_price * refills_per_year : null,
    usable_g,
    days_left: Math.max(0, usable_g - (cylinder_mass_g - remaining_g)) / input.daily_use_g_day,
    ...contents,
    pressure_bar_abs: state.pressure_bar_abs,
    phase: state.phase,
    liquid_present: state.phase === "two_phase" || state.phase === "liquid_full",
    fill_ratio_kg_l: fill_kg_l,
    max_fill_ratio_kg_l,
    fill_ratio_ok: fill_kg_l <= max_fill_ratio_kg_l,
    liquid_full_c: liquidFullTemperature(fill_kg_l),
  }
}

function requireSound(cylinder: Cylinder, field: (name: string) => string): void {
  const names = Object.keys(cylinder).map((name) => [name, field(name)])
  withFields(Object.fromEntries(names), () => checkBounds(cylinder, quantities))
  const { remaining_g, cylinder_mass_g } = cylinder
  if (remaining_g === undefined || remaining_g <= cylinder_mass_g) return
  throw new OutOfDomain(
    field("remaining_g"),
    `A cylinder of ${figures(cylinder_mass_g, 4)} g cannot hold ${figures(remaining_g, 4)} g. Subtract the empty weight stamped on it.`,
  )
}
