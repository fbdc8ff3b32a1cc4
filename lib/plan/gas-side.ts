import type { Answer } from "@/lib/chemistry/answer"
import { type BubbleRate, type BubbleRateUncertainty, bubbleRate } from "@/lib/gas/bubble-rate"
import { type CylinderComparison, type CylinderUncertainty, cylinderLife } from "@/lib/gas/cylinder-life"
import { type Demand, type DemandInput, type DemandUncertainty, gasDemand } from "@/lib/gas/demand"
import { dayPlan } from "@/lib/gas/feed"
import { UNATTENDED_MG_L } from "@/lib/gas/feed-cautions"
import { type LeadTime, type LeadTimeUncertainty, leadTime } from "@/lib/gas/lead-time"
import type { GasMethodName } from "@/lib/gas/methods"
import { type RoomSafety, type RoomUncertainty, roomSafety } from "@/lib/gas/room-safety"
import { prepareTank } from "@/lib/gas/tank-input"
import { type WorkingPressure, workingPressure } from "@/lib/gas/working-pressure"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import { type DayCourse, dayCourse } from "./day-course"
import type { Dosing } from "./facts"
import {
  ASSUMED_CYLINDER_G,
  ASSUMED_ROOM_M3,
  type Control,
  type PlanInput,
  plantDemands,
  USUAL_LEAD_MIN,
} from "./plan-input"
import type { TankWater } from "./tank-water"

/** The gas from the cylinder to the tank, and the tank's day. */
export interface GasSide {
  readonly demand: Answer<Demand, DemandUncertainty>
  readonly lead_time: Answer<LeadTime, LeadTimeUncertainty>
  readonly dosing: Dosing
  readonly day: DayCourse
  readonly working_pressure: Answer<WorkingPressure>
  readonly bubble_rate: Answer<BubbleRate, BubbleRateUncertainty>
  readonly cylinder: Answer<CylinderComparison, CylinderUncertainty>
  readonly room_safety: Answer<RoomSafety, RoomUncertainty>
}

/** What a tank needs with a method. */
export function demandOf(
  input: PlanInput,
  water: TankWater,
  method: GasMethodName,
): Answer<Demand, DemandUncertainty> {
  return gasDemand(gasInput(input, water, method))
}

/** Everything about the gas for a method whose demand is known. */
export function gasSide(
  input: PlanInput,
  water: TankWater,
  name: GasMethodName,
  demand: Answer<Demand, DemandUncertainty>,
): GasSide {
  const tankInput = gasInput(input, water, name)
  const dosing = dosingOf(input, tankInput, demand.result)
  const { feed_mg_min, daily_use_g_day } = dosing
  const working_pressure = withFields({ pore_diameter_um: "equipment.pore_diameter_um" }, () =>
    workingPressure({
      method: name,
      depth_m: input.depth_m,
      check_valve_bar: input.check_valve_bar,
      line_length_m: input.line_length_m,
      line_diameter_mm: input.line_diameter_mm,
      pore_diameter_um: input.equipment?.pore_diameter_um,
      feed_mg_min,
    }),
  )
  const { element_bar, water_bar, check_valve_bar } = working_pressure.result
  const masses = (input.cylinders ?? []).map(({ cylinder_mass_g }) => cylinder_mass_g)
  const single_g = masses.length > 0 ? undefined : (input.cylinder_mass_g ?? ASSUMED_CYLINDER_G)
  const { usable_fraction, ambient_c, cut_off_bar_abs, refill_price } = input
  const roomGiven = [input.room_volume_m3, input.room_length_m, input.room_width_m, input.room_height_m]
  return {
    demand,
    lead_time: leadTime({ ...tankInput, feed_mg_min, feed_ratio: 1 }),
    dosing,
    day: courseOf(input, tankInput, dosing),
    working_pressure,
    bubble_rate: bubbleRate({
      outlet_diameter_mm: input.outlet_diameter_mm,
      feed_mg_min,
      temperature_c: input.temperature_c,
      counter_pressure_bar: element_bar + water_bar + check_valve_bar,
    }),
    cylinder: cylinderLife({
      daily_use_g_day,
      usable_fraction,
      ambient_c,
      cut_off_bar_abs,
      refill_price,
      cylinders: input.cylinders,
      cylinder_mass_g: single_g ?? input.cylinder_mass_g,
    }),
    room_safety: roomSafety({
      cylinder_mass_g: Math.max(...masses, single_g ?? 0),
      room_volume_m3: roomGiven.every((size) => size === undefined) ? ASSUMED_ROOM_M3 : input.room_volume_m3,
      room_length_m: input.room_length_m,
      room_width_m: input.room_width_m,
      room_height_m: input.room_height_m,
      air_changes_per_h: input.air_changes_per_h,
      room_c: input.room_c,
      background_ppm: input.background_ppm,
      daily_use_g_day,
    }),
  }
}

function gasInput(input: PlanInput, water: TankWater, method: GasMethodName): DemandInput {
  const night_min = (24 - input.photoperiod_h) * 60
  return {
    ...input,
    volume_l: water.volume_l,
    surface_area_m2: water.surface_area_m2,
    method,
    plant_uptake_mg_l_h: input.plant_uptake_mg_l_h ?? plantDemands[input.plant_demand],
    wished_lead_min: input.wished_lead_min ?? Math.min(USUAL_LEAD_MIN[method], night_min),
  }
}

/** A controller throttles the feed of the wished lead; a timer alone may only carry a feed that stays harmless. */
function dosingOf(input: PlanInput, tankInput: DemandInput, demand: Demand): Dosing {
  const harmless = demand.uncontrolled_co2_mg_l <= UNATTENDED_MG_L
  const control: Control = input.equipment?.control ?? (harmless ? "timer" : "controller")
  const ramp = control === "controller" || harmless
  const feed_mg_min = feasible(ramp ? demand.ramp_feed_mg_min : demand.hold_feed_mg_min)
  const open_before_lights_min = tankInput.wished_lead_min
  const open_min = open_before_lights_min + 60 * input.photoperiod_h - input.close_before_lights_off_min
  return {
    control,
    control_reason: controlReason(control, harmless, demand),
    feed_mg_min,
    feed_ml_min: ramp ? demand.ramp_feed_ml_min : demand.hold_feed_ml_min,
    open_before_lights_min,
    close_before_lights_off_min: input.close_before_lights_off_min,
    daily_use_g_day: control === "controller" ? demand.daily_use_g_day : (feed_mg_min * open_min) / 1000,
  }
}

function controlReason(control: Control, harmless: boolean, demand: Demand): string {
  const evening = `${figures(demand.uncontrolled_co2_mg_l, 2)} mg/L by the evening`
  if (control === "controller") {
    return `A pH controller closes the valve at the set-point; unthrottled, the feed for this lead would reach ${evening}. The controller's own light gate does what a timer would: you need no timer beside it.`
  }
  if (harmless) {
    return `A timer is enough: this surface loses gas so fast that the feed stays at ${evening}. You need no controller beside it.`
  }
  return `On a timer alone only the hold feed is safe: CO2 climbs all day, from ${figures(demand.hold_only_lights_on_co2_mg_l, 2)} mg/L when the lights come on to ${figures(demand.hold_only_close_co2_mg_l, 2)} when the gas closes. You need no controller beside it, but the feed for the wished lead would reach ${evening}.`
}

function courseOf(input: PlanInput, tankInput: DemandInput, dosing: Dosing): DayCourse {
  const plan = dayPlan(tankInput, {
    feed_mg_min: dosing.feed_mg_min,
    lead_h: dosing.open_before_lights_min / 60,
    target_co2_mg_l: dosing.control === "controller" ? input.target_co2_mg_l : null,
  })
  return dayCourse(prepareTank(tankInput), plan, input.lights_on_h)
}

/** Throws {@link OutOfDomain} on a feed that no single valve and reactor are made for. */
export function feasible(feed_mg_min: number): number {
  const { min, max } = quantities.feed_mg_min
  if (feed_mg_min >= min && feed_mg_min <= max) return feed_mg_min
  throw new OutOfDomain(
    "volume_l",
    feed_mg_min > max
      ? `This tank needs ${figures(feed_mg_min, 3)} mg of CO2 a minute, more than one valve and line are made for (${max}). Plan it as several systems, or ask for less CO2.`
      : `This tank needs only ${figures(feed_mg_min, 2)} mg of CO2 a minute, less than any valve can meter (${min}).`,
  )
}
