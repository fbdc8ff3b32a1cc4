import { findRoot } from "@/lib/numeric/find-root"
import { gasDensity } from "./carbon-dioxide"
import {
  CRITICAL_DENSITY_KG_M3,
  CRITICAL_TEMPERATURE_C,
  saturation,
  singlePhasePressure,
} from "./equation-of-state"

/** `two_phase`: liquid under gas. `liquid_full`: all liquid, below 31 °C. `gas`: no liquid. `supercritical`: above. */
export type CylinderPhase = "two_phase" | "liquid_full" | "gas" | "supercritical"

export interface CylinderState {
  readonly pressure_bar_abs: number
  readonly phase: CylinderPhase
}

/**
 * Pressure in a closed cylinder that holds so many kg of CO2 per litre at a temperature.
 *
 * @source spanWagner1996: the saturation line where liquid and vapour share the cylinder, else the equation of state.
 * 0.01-0.8 kg/L, 0-60 °C, within 0.1 %.
 */
export function cylinderState(p: {
  readonly fill_kg_l: number
  readonly temperature_c: number
}): CylinderState {
  const density_kg_m3 = p.fill_kg_l * 1000
  const saturated = saturation(p.temperature_c)
  if (saturated && density_kg_m3 >= saturated.vapour_kg_m3 && density_kg_m3 <= saturated.liquid_kg_m3) {
    return { pressure_bar_abs: saturated.pressure_pa / 1e5, phase: "two_phase" }
  }
  const pressure_bar_abs = singlePhasePressure({ density_kg_m3, temperature_c: p.temperature_c }) / 1e5
  if (!saturated) return { pressure_bar_abs, phase: "supercritical" }
  return { pressure_bar_abs, phase: density_kg_m3 > saturated.liquid_kg_m3 ? "liquid_full" : "gas" }
}

/** What a cylinder gives and how its end shows. */
export interface CylinderContents {
  readonly water_capacity_l: number
  /** Left when the pressure has fallen to the cut-off. */
  readonly residual_g: number
  /** Left when the last liquid goes and the gauge begins to fall; `null` above 31 °C, where there is no liquid. */
  readonly liquid_gone_g: number | null
}

/**
 * @source tsonopoulos1974 for the residue (gas at the cut-off, up to 10 bar), spanWagner1996 for the last liquid.
 */
export function cylinderContents(p: {
  readonly cylinder_mass_g: number
  readonly fill_kg_l: number
  readonly temperature_c: number
  readonly cut_off_bar_abs: number
}): CylinderContents {
  const water_capacity_l = p.cylinder_mass_g / 1000 / p.fill_kg_l
  const residue = gasDensity({ pressure_pa: p.cut_off_bar_abs * 1e5, temperature_c: p.temperature_c })
  const saturated = saturation(p.temperature_c)
  return {
    water_capacity_l,
    residual_g: water_capacity_l * residue,
    liquid_gone_g: saturated ? Math.min(water_capacity_l * saturated.vapour_kg_m3, p.cylinder_mass_g) : null,
  }
}

/**
 * Temperature at which a full cylinder holds liquid alone, °C; above it the pressure climbs steeply. `null` for a fill
 * below the critical density, which never becomes all liquid.
 *
 * @source spanWagner1996, eq. 3.14
 */
export function liquidFullTemperature(fill_kg_l: number): number | null {
  const density = fill_kg_l * 1000
  if (density <= CRITICAL_DENSITY_KG_M3) return null
  const surplus = (temperature_c: number) => saturation(temperature_c)!.liquid_kg_m3 - density
  // Density falls without bound in slope towards the critical point; a fill that near to it turns liquid there.
  const high = CRITICAL_TEMPERATURE_C - 1e-6
  if (surplus(high) >= 0) return high
  return findRoot({ f: surplus, low: TRIPLE_POINT_C, high, tolerance: 1e-6 })
}

/** Largest fill that a test pressure allows, kg/L; none below 190 bar. @source adrP200, UN 1013 */
export function maxFillRatio(test_pressure_bar: number): number {
  if (test_pressure_bar >= 250) return 0.76
  return test_pressure_bar >= 190 ? 0.68 : 0
}

/** °C. @source spanWagner1996, eq. 3.7 */
const TRIPLE_POINT_C = -56.558
