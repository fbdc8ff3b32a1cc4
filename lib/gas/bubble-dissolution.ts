import { type BubbleWater, bubbleMassTransfer, bubbleRise, GRAVITY_M_S2 } from "./bubble-rise"
import { GAS_CONSTANT, gasDensity, MOLAR_MASS_KG_MOL, STANDARD_ATMOSPHERE_PA } from "./carbon-dioxide"

/** A bubble's surroundings: the water, its pressure, the CO2 it already holds, and how much CO2 it could hold. */
export interface DissolvingInto {
  readonly water: BubbleWater
  /** Absolute pressure of the water at the bubble. */
  readonly pressure_pa: number
  /** Free CO2 already in the water. */
  readonly co2_mg_l: number
  /** CO2 in equilibrium with one atmosphere of CO2. */
  readonly henry_mg_l_atm: number
  readonly vapour_pressure_atm: number
}

/** Below this a bubble is counted as dissolved: the end of the range of `bubbleRise`, 0.1 % of a 0.5 mm bubble. */
export const DISSOLVED_BELOW_MM = 0.05

/**
 * How fast a bubble of pure CO2 shrinks, mm of diameter per second by its diameter in mm; negative if the water is
 * supersaturated and the bubble grows. What does not depend on the diameter is computed once, for solvers.
 *
 * Mass balance of a sphere whose inner pressure is raised by 4σ/d; k_L from `bubbleMassTransfer`. Nitrogen and oxygen
 * that diffuse in are left out, so a real bubble leaves a residue of 2-3 % of its volume.
 */
export function createShrinkRate(into: DissolvingInto): (diameter_mm: number) => number {
  const { water, pressure_pa, co2_mg_l, henry_mg_l_atm, vapour_pressure_atm } = into
  const laplace = 4 * water.surface_tension_n_m
  const density = gasDensity({ pressure_pa, temperature_c: water.temperature_c })
  const laplaceDensity = (laplace * MOLAR_MASS_KG_MOL) / (GAS_CONSTANT * (water.temperature_c + 273.15))
  return (diameter_mm) => {
    const diameter_m = diameter_mm / 1000
    const innerPressureAtm = (pressure_pa + laplace / diameter_m) / STANDARD_ATMOSPHERE_PA
    const deficit = henry_mg_l_atm * (innerPressureAtm - vapour_pressure_atm) - co2_mg_l
    const transfer = bubbleMassTransfer(diameter_mm, water)
    // mg/L over 1000 is kg/m³, and m/s times 1000 is mm/s: the two thousands cancel.
    return (2 * transfer * deficit) / (density + ((2 / 3) * laplaceDensity) / diameter_m)
  }
}

export interface Dissolution {
  /** Seconds until the bubble is dissolved. */
  readonly time_s: number
  /** Metres it moves against the water meanwhile, upwards. */
  readonly rise_m: number
}

/**
 * Time that a bubble takes to dissolve and how far it rises through the water meanwhile, at constant pressure.
 *
 * Simpson's rule over the diameter; within 1e-6 of the differential equation. `null` if the water is so full that the
 * bubble does not dissolve.
 */
export function dissolve(bubble_diameter_mm: number, into: DissolvingInto): Dissolution | null {
  if (bubble_diameter_mm <= DISSOLVED_BELOW_MM) return { time_s: 0, rise_m: 0 }
  const rate = createShrinkRate(into)
  const width = (bubble_diameter_mm - DISSOLVED_BELOW_MM) / PANELS
  let time_s = 0
  let rise_m = 0
  for (let node = 0; node <= 2 * PANELS; node++) {
    const diameter = bubble_diameter_mm - (node * width) / 2
    const shrinking = rate(diameter)
    if (shrinking <= 0) return null
    const weight = ((node === 0 || node === 2 * PANELS ? 1 : node % 2 === 1 ? 4 : 2) * width) / 6
    time_s += weight / shrinking
    rise_m += (weight * bubbleRise(diameter, into.water)) / shrinking
  }
  return { time_s, rise_m }
}

export interface RisingBubble {
  readonly bubble_diameter_mm: number
  /** Height of water from where the bubble is released to the surface. */
  readonly depth_m: number
  /** Upward speed of the water that the bubbles drag along. */
  readonly plume_m_s: number
  readonly into: Omit<DissolvingInto, "pressure_pa">
}

/**
 * Share of its CO2 that a bubble gives to the water before it reaches the surface, 0-1: the efficiency of an in-tank
 * diffuser that makes bubbles of that size.
 *
 * One bubble at the mean pressure of its path, 1 - (d_end/d_0)³. Within 1e-4 of the differential equation with the
 * pressure falling on the way up. Depth 0-2 m, 0.05-5 mm.
 */
export function risingBubbleEfficiency({
  bubble_diameter_mm,
  depth_m,
  plume_m_s,
  into,
}: RisingBubble): number {
  if (bubble_diameter_mm <= DISSOLVED_BELOW_MM) return depth_m > 0 ? 1 : 0
  const pressure_pa = STANDARD_ATMOSPHERE_PA + (into.water.density_kg_m3 * GRAVITY_M_S2 * depth_m) / 2
  const rate = createShrinkRate({ ...into, pressure_pa })
  const width = (bubble_diameter_mm - DISSOLVED_BELOW_MM) / PANELS
  const metresPerMm = (diameter: number) => {
    const shrinking = rate(diameter)
    return shrinking > 0
      ? (bubbleRise(diameter, into.water) + plume_m_s) / shrinking
      : Number.POSITIVE_INFINITY
  }
  let travelled = 0
  let above = metresPerMm(bubble_diameter_mm)
  for (let panel = 0; panel < PANELS; panel++) {
    const start = bubble_diameter_mm - panel * width
    const below = metresPerMm(start - width)
    const stretch = (width / 6) * (above + 4 * metresPerMm(start - width / 2) + below)
    if (travelled + stretch >= depth_m) {
      const end = start - (width * (depth_m - travelled)) / stretch
      return 1 - (end / bubble_diameter_mm) ** 3
    }
    travelled += stretch
    above = below
  }
  return 1
}

/** Panels of Simpson's rule. */
const PANELS = 64
