import type { Assumption } from "@/lib/chemistry/answer"
import {
  airPco2Atm,
  type CarbonateSystem,
  carbonateSystem,
  co2AtPressure,
  phAtCo2,
} from "@/lib/chemistry/carbonate"
import { type IonicStrength, ionicStrength, type WaterReadings } from "@/lib/chemistry/ionic-strength"
import type { SourceId } from "@/lib/chemistry/sources"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import type { TankBalance } from "./balance"
import type { Agitation } from "./exchange"
import type { GasMethodName } from "./methods"
import { tankEfficiency } from "./tank-efficiency"
import { tankExchange } from "./tank-exchange"

/** Two pH readings of one night with gas and light off: they measure the exchange instead of guessing it. */
export interface OvernightReadings {
  readonly start_ph: number
  readonly end_ph: number
  readonly elapsed_h: number
}

/** What every question about the tank's gas needs. The caller fills in the defaults of `gasDefaults`. */
export interface TankInput extends WaterReadings {
  readonly temperature_c: number
  readonly phosphate_mg_l?: number | undefined
  readonly air_co2_ppm: number
  readonly altitude_m: number
  readonly volume_l?: number | undefined
  readonly surface_area_m2?: number | undefined
  readonly length_cm?: number | undefined
  readonly width_cm?: number | undefined
  /** Of the water. */
  readonly height_cm?: number | undefined
  readonly target_co2_mg_l: number
  readonly agitation: Agitation
  readonly overnight?: OvernightReadings | undefined
  readonly method: GasMethodName
  readonly dissolution_efficiency?: number | undefined
  /** Of a diffuser in the tank; with `depth_m` it gives the efficiency from the bubbles' rise. */
  readonly bubble_diameter_mm?: number | undefined
  readonly depth_m?: number | undefined
  readonly plant_uptake_mg_l_h: number
  /** What the tank rests at without gas. Absent: the balance with the air. */
  readonly rest_co2_mg_l?: number | undefined
}

export interface Range {
  readonly low: number
  readonly high: number
}

/** A value with the range it may lie in, and where it comes from. */
export interface Judged extends Range {
  readonly value: number
  readonly assumption: Assumption
  readonly sources: readonly SourceId[]
}

/** A tank ready to be computed with. */
export interface PreparedTank {
  readonly balance: TankBalance
  readonly system: CarbonateSystem
  readonly ionic: IonicStrength
  readonly kh_dkh: number
  readonly target_co2_mg_l: number
  readonly rest_co2_mg_l: number
  readonly exchange: Range
  readonly efficiency: Range
  readonly assumptions: readonly Assumption[]
  readonly sources: readonly SourceId[]
}

/**
 * Checks a tank and works out its exchange, its balance with the air and its efficiency.
 *
 * Throws `OutOfDomain` on the field to change: a value out of bounds, no volume, readings that contradict, or a
 * target that the tank holds by itself.
 */
export function prepareTank(input: TankInput): PreparedTank {
  checkBounds(input, quantities)
  if (input.temperature_c > HOTTEST_C) {
    throw new OutOfDomain("temperature_c", `The exchange with the air is known up to ${HOTTEST_C} °C.`)
  }
  const volume_l = tankVolume(input)
  const ionic = ionicStrength(input)
  const system = carbonateSystem({ ...input, ionic_strength_mol_l: ionic.ionic_strength_mol_l })
  const air_co2_mg_l = co2AtPressure(system, airPco2Atm(input))
  const rest_co2_mg_l = input.rest_co2_mg_l ?? air_co2_mg_l
  requireAboveRest(input, rest_co2_mg_l, air_co2_mg_l)
  const exchange = tankExchange(input, { volume_l, rest_co2_mg_l, system })
  const efficiency = tankEfficiency(input)
  return {
    balance: {
      volume_l,
      exchange_per_h: exchange.value,
      air_co2_mg_l,
      plant_uptake_mg_l_h: input.plant_uptake_mg_l_h,
      respiration_mg_l_h: exchange.value * (rest_co2_mg_l - air_co2_mg_l),
      dissolution_efficiency: efficiency.value,
    },
    system,
    ionic,
    kh_dkh: input.kh_dkh,
    target_co2_mg_l: input.target_co2_mg_l,
    rest_co2_mg_l,
    exchange,
    efficiency,
    assumptions: [exchange.assumption, efficiency.assumption, ...tankAssumptions(input, rest_co2_mg_l)],
    sources: [...new Set([...exchange.sources, ...efficiency.sources, ...WATER_SOURCES])],
  }
}

/** The tank with another exchange and efficiency, the level at rest kept. */
export function withBalance(
  tank: PreparedTank,
  exchange_per_h: number,
  dissolution_efficiency: number,
): TankBalance {
  const { balance, rest_co2_mg_l } = tank
  const respiration_mg_l_h = exchange_per_h * (rest_co2_mg_l - balance.air_co2_mg_l)
  return { ...balance, exchange_per_h, dissolution_efficiency, respiration_mg_l_h }
}

/** pH of the tank's water at a CO2 level. */
export function tankPh(tank: PreparedTank, co2_mg_l: number): number {
  return phAtCo2(tank.system, { co2_mg_l, kh_dkh: tank.kh_dkh })
}

const HOTTEST_C = 40

const WATER_SOURCES: readonly SourceId[] = ["plummerBusenberg1982", "weissPrice1980", "truesdellJones1974"]

function tankVolume({ volume_l, length_cm, width_cm, height_cm }: TankInput): number {
  if (volume_l !== undefined) return volume_l
  if (length_cm === undefined || width_cm === undefined || height_cm === undefined) {
    throw new OutOfDomain("volume_l", "Give the water volume, or length, width and height of the water.")
  }
  const volume = (length_cm * width_cm * height_cm) / 1000
  withFields({ volume_l: "height_cm" }, () => checkBounds({ volume_l: volume }, quantities))
  return volume
}

function requireAboveRest({ target_co2_mg_l, rest_co2_mg_l }: TankInput, rest: number, air: number): void {
  if (rest < air) {
    throw new OutOfDomain(
      "rest_co2_mg_l",
      `The air alone keeps ${figures(air, 3)} mg/L in this water, so it cannot rest at ${figures(rest, 3)}. Measure again, or leave this out.`,
    )
  }
  if (target_co2_mg_l > rest) return
  const because = rest_co2_mg_l === undefined ? "The air alone" : "The tank by itself"
  throw new OutOfDomain(
    "target_co2_mg_l",
    `${because} keeps ${figures(rest, 3)} mg/L, so no gas is needed for ${figures(target_co2_mg_l, 3)}. Ask for more than that.`,
  )
}

function tankAssumptions(input: TankInput, rest: number): Assumption[] {
  const assumptions: Assumption[] = [
    {
      code: "plant_uptake",
      message: `The plants take ${figures(input.plant_uptake_mg_l_h, 2)} mg/L an hour in light: 0.3 where they are sparse, 1 usual, 2 dense under strong light.`,
    },
    {
      code: "well_mixed",
      message:
        "The whole tank mixes at once, and its alkalinity stays the same while CO2 comes and goes. A cover that keeps CO2 over the water is not counted.",
    },
  ]
  if (input.rest_co2_mg_l === undefined) {
    assumptions.push({
      code: "rests_at_air",
      message: `Without gas the tank rests at ${figures(rest, 2)} mg/L, the balance with air of ${figures(input.air_co2_ppm, 3)} ppm. Tanks with fish and rich soil rest at 2 to 4; give your own level if you know it.`,
    })
  }
  return assumptions
}
