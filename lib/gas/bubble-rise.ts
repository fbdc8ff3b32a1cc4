import { co2Diffusivity, surfaceTension, waterDensity, waterViscosity } from "@/lib/chemistry/water"

/** m/s², standard gravity, exact. */
export const GRAVITY_M_S2 = 9.80665

/** What a bubble feels of the water around it; computed once, since the formulas below run inside solvers. */
export interface BubbleWater {
  readonly temperature_c: number
  readonly density_kg_m3: number
  readonly viscosity_pa_s: number
  readonly surface_tension_n_m: number
  readonly co2_diffusivity_m2_s: number
}

/** The water's properties at its temperature, 5-40 °C. */
export function bubbleWater(temperature_c: number): BubbleWater {
  return {
    temperature_c,
    density_kg_m3: waterDensity(temperature_c),
    viscosity_pa_s: waterViscosity(temperature_c),
    surface_tension_n_m: surfaceTension(temperature_c),
    co2_diffusivity_m2_s: co2Diffusivity(temperature_c),
  }
}

/**
 * Terminal velocity of a bubble in contaminated water, m/s: tank water holds enough surfactant to make a bubble's
 * surface rigid.
 *
 * Up to 1 mm the force balance with the drag of a rigid sphere, @source schillerNaumann1935; from 1.3 mm
 * @source cliftGraceWeber1978, eqs 7-3 to 7-5; a linear blend between them, ours.
 * Range 0.05-5 mm, 5-40 °C; within 10 % of the measured curves.
 */
export function bubbleRise(diameter_mm: number, water: BubbleWater): number {
  if (diameter_mm <= RIGID_SPHERE_TO_MM) return rigidSphereRise(diameter_mm / 1000, water)
  if (diameter_mm >= DEFORMED_FROM_MM) return deformedRise(diameter_mm / 1000, water)
  const share = (diameter_mm - RIGID_SPHERE_TO_MM) / (DEFORMED_FROM_MM - RIGID_SPHERE_TO_MM)
  return (
    (1 - share) * rigidSphereRise(diameter_mm / 1000, water) + share * deformedRise(diameter_mm / 1000, water)
  )
}

/** Upper bound of the rise, m/s: a bubble above 1.3 mm in perfectly clean water. @source mendelson1967 */
export function cleanBubbleRise(diameter_mm: number, water: BubbleWater): number {
  const diameter_m = diameter_mm / 1000
  return Math.sqrt(
    (2 * water.surface_tension_n_m) / (water.density_kg_m3 * diameter_m) + (GRAVITY_M_S2 * diameter_m) / 2,
  )
}

/**
 * Mass-transfer coefficient k_L of a bubble with a rigid surface, m/s; a mobile surface would be 4 to 5 times faster.
 *
 * @source frossling1938, Sh = 2 + 0.552 Re^(1/2) Sc^(1/3); same range as `bubbleRise`.
 */
export function bubbleMassTransfer(diameter_mm: number, water: BubbleWater): number {
  const diameter_m = diameter_mm / 1000
  const kinematicViscosity = water.viscosity_pa_s / water.density_kg_m3
  const reynolds = (bubbleRise(diameter_mm, water) * diameter_m) / kinematicViscosity
  const schmidt = kinematicViscosity / water.co2_diffusivity_m2_s
  const sherwood = 2 + 0.552 * Math.sqrt(reynolds) * Math.cbrt(schmidt)
  return (sherwood * water.co2_diffusivity_m2_s) / diameter_m
}

/** Ends of the blend between the rigid sphere and the deformed bubble; ours, an engineering judgement. */
const RIGID_SPHERE_TO_MM = 1
const DEFORMED_FROM_MM = 1.3
/** kg/m³, CO2 near atmospheric pressure: its 10 % of uncertainty moves the rise by 0.02 %. */
const GAS_DENSITY_KG_M3 = 1.8

function rigidSphereRise(diameter_m: number, water: BubbleWater): number {
  const buoyancy = (water.density_kg_m3 - GAS_DENSITY_KG_M3) * GRAVITY_M_S2
  const stokes = (buoyancy * diameter_m * diameter_m) / (18 * water.viscosity_pa_s)
  const drag = 0.15 * ((diameter_m * water.density_kg_m3) / water.viscosity_pa_s) ** 0.687
  // u(1 + drag·u^0.687) = stokes is convex and rising, so Newton from above converges from one side.
  let rise = stokes
  for (let step = 0; step < 30; step++) {
    const extra = drag * rise ** 0.687
    const next = rise - (rise * (1 + extra) - stokes) / (1 + 1.687 * extra)
    if (Math.abs(next - rise) <= 1e-13 * rise) return next
    rise = next
  }
  return rise
}

function deformedRise(diameter_m: number, water: BubbleWater): number {
  const { density_kg_m3: density, viscosity_pa_s: viscosity, surface_tension_n_m: tension } = water
  const buoyancy = (density - GAS_DENSITY_KG_M3) * GRAVITY_M_S2
  const mortonPower = ((buoyancy * viscosity ** 4) / (density * density * tension ** 3)) ** -0.149
  const eotvos = (buoyancy * diameter_m * diameter_m) / tension
  const h = (4 / 3) * eotvos * mortonPower * (viscosity / 0.0009) ** -0.14
  const j = h <= 59.3 ? 0.94 * h ** 0.757 : 3.42 * h ** 0.441
  return (viscosity / (density * diameter_m)) * mortonPower * (j - 0.857)
}
