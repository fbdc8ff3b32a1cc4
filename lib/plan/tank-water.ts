import type { Assumption } from "@/lib/chemistry/answer"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import type { PlanInput } from "./plan-input"

/** The water that is really in a tank, and its open surface. */
export interface TankWater {
  readonly volume_l: number
  readonly surface_area_m2: number
  readonly assumptions: readonly Assumption[]
}

/** Share of poured soil or gravel that is water. @source engineeringJudgement, 0.35 to 0.45 */
const SUBSTRATE_POROSITY = 0.4

/**
 * Volume of the water: the tank up to its water line, less soil and hardscape.
 *
 * Throws {@link OutOfDomain} when neither volume nor dimensions are given, or when no water is left.
 */
export function tankWater(input: PlanInput): TankWater {
  checkBounds(input, quantities)
  const { hardscape_l = 0 } = input
  const tank_l = tankVolume(input)
  const surface = tankSurface(input, tank_l)
  const substrate_l = substrateVolume(input, surface.value)
  const volume_l = tank_l - substrate_l * (1 - SUBSTRATE_POROSITY) - hardscape_l
  const soil = input.substrate_l === undefined ? "substrate_depth_cm" : "substrate_l"
  if (volume_l < tank_l / 4) {
    throw new OutOfDomain(
      substrate_l > hardscape_l ? soil : "hardscape_l",
      `Of ${figures(tank_l, 3)} L only ${figures(Math.max(0, volume_l), 3)} L of water would be left. Check the tank, the soil and the stones.`,
    )
  }
  const from = input.volume_l === undefined ? "height_cm" : "volume_l"
  withFields({ volume_l: from }, () => checkBounds({ volume_l }, quantities))
  const displaced = tank_l - volume_l
  return {
    volume_l,
    surface_area_m2: surface.value,
    assumptions: [
      ...surface.assumptions,
      ...(displaced === 0 ? [undisplaced(tank_l)] : [displacement(tank_l, volume_l, substrate_l)]),
    ],
  }
}

function tankVolume({ volume_l, length_cm, width_cm, height_cm }: PlanInput): number {
  if (volume_l !== undefined) return volume_l
  if (length_cm !== undefined && width_cm !== undefined && height_cm !== undefined) {
    return (length_cm * width_cm * height_cm) / 1000
  }
  throw new OutOfDomain("volume_l", "Give the volume of the tank, or length, width and height of its water.")
}

function tankSurface({ surface_area_m2, length_cm, width_cm }: PlanInput, tank_l: number) {
  if (surface_area_m2 !== undefined) return { value: surface_area_m2, assumptions: [] }
  if (length_cm !== undefined && width_cm !== undefined) {
    return { value: (length_cm * width_cm) / 10_000, assumptions: [] }
  }
  const value = usualSurface(tank_l)
  const message = `A tank of ${figures(tank_l, 3)} L usually has ${figures(value, 2)} m² of open surface; give length and width to replace this.`
  return { value, assumptions: [{ code: "surface_from_volume", message }] }
}

/** Open surface of a tank of usual proportions: 0.18 m² at 60 L, 0.9 at 450 L. @source engineeringJudgement */
function usualSurface(tank_l: number): number {
  return 0.0068 * tank_l ** 0.8
}

function substrateVolume({ substrate_l, substrate_depth_cm }: PlanInput, surface_area_m2: number): number {
  return substrate_l ?? (substrate_depth_cm ?? 0) * surface_area_m2 * 10
}

function undisplaced(tank_l: number): Assumption {
  const message = `All of the ${figures(tank_l, 3)} L is water. Soil, stones and wood take 10 to 20 % in most tanks: give them, and feed and cylinder shrink with the water.`
  return { code: "nothing_displaced", message }
}

function displacement(tank_l: number, volume_l: number, substrate_l: number): Assumption {
  const soil = substrate_l > 0 ? ` Poured soil is ${100 * SUBSTRATE_POROSITY} % water.` : ""
  const message = `The tank of ${figures(tank_l, 3)} L holds ${figures(volume_l, 3)} L of water.${soil}`
  return { code: "displacement", message }
}
