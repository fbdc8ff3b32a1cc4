import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import type { ReadingErrors } from "@/lib/chemistry/uncertainty"
import type { ElementInput } from "@/lib/flow/elements"
import type { LoopInput } from "@/lib/flow/loop-input"
import { type ReactorInput, reactorDefaults } from "@/lib/flow/reactor-input"
import type { Cylinder } from "@/lib/gas/cylinder-life"
import { gasDefaults } from "@/lib/gas/defaults"
import type { GasMethodName } from "@/lib/gas/methods"
import type { TankInput } from "@/lib/gas/tank-input"
import type { CatalogItem } from "./match"

/** How much CO2 the plants want. */
export const plantDemands = { sparse: 0.3, usual: 1, dense: 2 } as const
export type PlantDemand = keyof typeof plantDemands

/** Who closes the valve: a pH controller gated by the light, or a timer alone. One of them, never both. */
export type Control = "controller" | "timer"

/** What the person owns or insists on. */
export interface Equipment {
  readonly method?: GasMethodName | undefined
  readonly reactor?: ReactorInput | undefined
  readonly control?: Control | undefined
  /** Of the diffuser's ceramic or membrane. */
  readonly pore_diameter_um?: number | undefined
}

/** The whole job, as on the wire with its defaults filled in. */
export interface PlanInput
  extends Omit<TankInput, "method" | "plant_uptake_mg_l_h">,
    Omit<ReadingErrors, "kh_dkh" | "temperature_c">,
    Omit<LoopInput, "volume_l" | "temperature_c"> {
  readonly doc_mg_l?: number | undefined
  /** Soil as poured, and stone and wood: they take water away. */
  readonly substrate_depth_cm?: number | undefined
  readonly substrate_l?: number | undefined
  readonly hardscape_l?: number | undefined
  readonly plant_demand: PlantDemand
  /** Replaces what the demand class stands for. */
  readonly plant_uptake_mg_l_h?: number | undefined
  readonly photoperiod_h: number
  readonly lights_on_h: number
  readonly close_before_lights_off_min: number
  /** Absent: what suits the method. */
  readonly wished_lead_min?: number | undefined
  readonly reach_fraction: number
  readonly depth_m: number
  readonly check_valve_bar: number
  readonly line_length_m: number
  readonly line_diameter_mm: number
  readonly outlet_diameter_mm: number
  readonly cylinder_mass_g?: number | undefined
  readonly cylinders?: readonly Cylinder[] | undefined
  readonly refill_price?: number | undefined
  readonly usable_fraction: number
  readonly ambient_c: number
  readonly cut_off_bar_abs: number
  readonly room_volume_m3?: number | undefined
  readonly room_length_m?: number | undefined
  readonly room_width_m?: number | undefined
  readonly room_height_m?: number | undefined
  readonly air_changes_per_h: number
  readonly room_c: number
  readonly background_ppm: number
  readonly equipment?: Equipment | undefined
  readonly catalog?: readonly CatalogItem[] | undefined
}

/** Fittings of a canister filter's loop that nobody counted: one intake, one outflow, taps at the filter. */
const usualElements: readonly ElementInput[] = [
  { kind: "intake_strainer" },
  { kind: "barb", count: 4 },
  { kind: "quick_release" },
  { kind: "bend", count: 4 },
  { kind: "lily_outflow" },
]

/** What a plan takes for granted when the caller does not say: the only place. */
export const planDefaults = {
  temperature_c: carbonateDefaults.temperature_c,
  air_co2_ppm: carbonateDefaults.air_co2_ppm,
  altitude_m: carbonateDefaults.altitude_m,
  ph_error: carbonateDefaults.ph_error,
  kh_error_dkh: carbonateDefaults.kh_error_dkh,
  temperature_error_c: carbonateDefaults.temperature_error_c,
  target_co2_mg_l: gasDefaults.target_co2_mg_l,
  agitation: gasDefaults.agitation,
  plant_demand: "usual",
  photoperiod_h: gasDefaults.photoperiod_h,
  lights_on_h: gasDefaults.lights_on_h,
  close_before_lights_off_min: gasDefaults.close_before_lights_off_min,
  reach_fraction: gasDefaults.reach_fraction,
  depth_m: gasDefaults.depth_m,
  check_valve_bar: gasDefaults.check_valve_bar,
  line_length_m: gasDefaults.line_length_m,
  line_diameter_mm: gasDefaults.line_diameter_mm,
  outlet_diameter_mm: gasDefaults.outlet_diameter_mm,
  usable_fraction: gasDefaults.usable_fraction,
  ambient_c: gasDefaults.ambient_c,
  cut_off_bar_abs: gasDefaults.cut_off_bar_abs,
  air_changes_per_h: gasDefaults.air_changes_per_h,
  room_c: gasDefaults.room_c,
  background_ppm: gasDefaults.background_ppm,
  elements: usualElements,
  clogging: reactorDefaults.clogging,
  lift_m: reactorDefaults.lift_m,
  clean_media_fraction: reactorDefaults.clean_media_fraction,
} as const

/** A cylinder and a room that nobody described: a common refillable size, a small living room. */
export const ASSUMED_CYLINDER_G = 2000
export const ASSUMED_ROOM_M3 = 30

/**
 * Minutes before the lights that each method opens. Common practice, no source: a reactor 1 to 1.5 h, a diffuser
 * earlier, since less of its gas dissolves.
 */
export const USUAL_LEAD_MIN: Readonly<Record<GasMethodName, number>> = {
  inline_reactor: gasDefaults.wished_lead_min,
  inline_diffuser: 95,
  diffuser: 120,
}
