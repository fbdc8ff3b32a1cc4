import { z } from "zod"
import { quantity } from "@/lib/api/quantity"
import { type GasMethodName, gasMethods } from "@/lib/gas/methods"
import { type PlantDemand, planDefaults, plantDemands } from "@/lib/plan/plan-input"
import { khError, phError, waterFields } from "../carbonate/water-fields"
import { loopFields, reactorFields } from "../flow/loop-fields"
import { tankFields } from "../gas/tank-fields"

const demands = Object.keys(plantDemands) as [PlantDemand, ...PlantDemand[]]
const methods = Object.keys(gasMethods) as [GasMethodName, ...GasMethodName[]]
const { method: _, plant_uptake_mg_l_h: __, depth_m: ___, ...tank } = tankFields
const { pump, hose, return_hose, elements, clogging, lift_m, clean_media_fraction } = loopFields

const cylinder = z.strictObject({
  name: z.string().max(120).optional(),
  cylinder_mass_g: quantity("cylinder_mass_g"),
  remaining_g: quantity("remaining_g").optional(),
  fill_ratio_kg_l: quantity("fill_ratio_kg_l").optional(),
  test_pressure_bar: quantity("test_pressure_bar").optional(),
  price: quantity("price").optional(),
  refill_price: quantity("refill_price").optional(),
})

const withDefault = <Name extends keyof typeof planDefaults & Parameters<typeof quantity>[0]>(name: Name) =>
  quantity(name).default(planDefaults[name] as number)

/** The whole job: tank, water, plants and light, filter and hose, cylinder and room, what is owned already. */
export const planFields = {
  ...tank,
  ...phError,
  ...khError,
  temperature_error_c: waterFields.temperature_error_c,
  doc_mg_l: waterFields.doc_mg_l,
  substrate_depth_cm: quantity("substrate_depth_cm").optional(),
  substrate_l: quantity("substrate_l").optional(),
  hardscape_l: quantity("hardscape_l").optional(),
  plant_demand: z
    .enum(demands)
    .default(planDefaults.plant_demand)
    .meta({ description: "How much CO2 the plants want" }),
  plant_uptake_mg_l_h: quantity("plant_uptake_mg_l_h").optional(),
  photoperiod_h: withDefault("photoperiod_h"),
  lights_on_h: withDefault("lights_on_h"),
  close_before_lights_off_min: withDefault("close_before_lights_off_min"),
  wished_lead_min: quantity("wished_lead_min").optional(),
  reach_fraction: withDefault("reach_fraction"),
  pump,
  hose,
  return_hose,
  elements: elements.default([...planDefaults.elements]),
  clogging,
  lift_m,
  clean_media_fraction,
  depth_m: withDefault("depth_m"),
  check_valve_bar: withDefault("check_valve_bar"),
  line_length_m: withDefault("line_length_m"),
  line_diameter_mm: withDefault("line_diameter_mm"),
  outlet_diameter_mm: withDefault("outlet_diameter_mm"),
  cylinder_mass_g: quantity("cylinder_mass_g").optional(),
  cylinders: z.array(cylinder).min(1).max(20).optional().meta({ description: "Several to compare" }),
  refill_price: quantity("refill_price").optional(),
  usable_fraction: withDefault("usable_fraction"),
  ambient_c: withDefault("ambient_c"),
  cut_off_bar_abs: withDefault("cut_off_bar_abs"),
  room_volume_m3: quantity("room_volume_m3").optional(),
  room_length_m: quantity("room_length_m").optional(),
  room_width_m: quantity("room_width_m").optional(),
  room_height_m: quantity("room_height_m").optional(),
  air_changes_per_h: withDefault("air_changes_per_h"),
  room_c: withDefault("room_c"),
  background_ppm: withDefault("background_ppm"),
  equipment: z
    .strictObject({
      method: z.enum(methods).optional(),
      reactor: reactorFields.reactor.optional(),
      control: z.enum(["controller", "timer"]).optional(),
      pore_diameter_um: quantity("pore_diameter_um").optional(),
    })
    .optional()
    .meta({ description: "What is owned already or insisted on" }),
}

/** A planted tank of 180 L with a filter of 1,000 L/h: the example of every question about a whole system. */
export const examplePlan = {
  length_cm: 90,
  width_cm: 45,
  height_cm: 45,
  kh_dkh: 4,
  pump: { max_flow_l_h: 1000, max_head_m: 1.6 },
  hose: { inner_diameter_mm: 16, length_m: 3 },
  cylinder_mass_g: 2000,
  room_volume_m3: 40,
}
