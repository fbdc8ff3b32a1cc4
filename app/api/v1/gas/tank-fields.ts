import { z } from "zod"
import { figure, quantity } from "@/lib/api/quantity"
import { gasDefaults } from "@/lib/gas/defaults"
import { AGITATION_K600_CM_H, type Agitation } from "@/lib/gas/exchange"
import { type GasMethodName, gasMethods } from "@/lib/gas/methods"
import { waterFields } from "../carbonate/water-fields"

const agitations = Object.keys(AGITATION_K600_CM_H) as [Agitation, ...Agitation[]]
const methods = Object.keys(gasMethods) as [GasMethodName, ...GasMethodName[]]

export const gasMethod = z
  .enum(methods)
  .default(gasDefaults.method)
  .meta({ description: "How the gas gets into the water" })

const { temperature_c, air_co2_ppm, altitude_m, temperature_error_c, doc_mg_l, ...readings } = waterFields

/** What every question about the tank's gas takes. */
export const tankFields = {
  volume_l: quantity("volume_l").optional(),
  surface_area_m2: quantity("surface_area_m2").optional(),
  length_cm: quantity("length_cm").optional(),
  width_cm: quantity("width_cm").optional(),
  height_cm: quantity("height_cm").optional(),
  kh_dkh: quantity("kh_dkh"),
  temperature_c,
  air_co2_ppm,
  altitude_m,
  ...readings,
  target_co2_mg_l: quantity("target_co2_mg_l").default(gasDefaults.target_co2_mg_l),
  agitation: z.enum(agitations).default(gasDefaults.agitation).meta({
    description: "How the surface moves; two pH readings of a night (`overnight`) replace the guess",
  }),
  overnight: z
    .strictObject({
      start_ph: quantity("start_ph"),
      end_ph: quantity("end_ph"),
      elapsed_h: quantity("elapsed_h"),
    })
    .optional()
    .meta({ description: "Two pH readings of one night with gas and light off" }),
  method: gasMethod,
  dissolution_efficiency: quantity("dissolution_efficiency").optional(),
  bubble_diameter_mm: quantity("bubble_diameter_mm").optional(),
  depth_m: quantity("depth_m").optional(),
  plant_uptake_mg_l_h: quantity("plant_uptake_mg_l_h").default(gasDefaults.plant_uptake_mg_l_h),
  rest_co2_mg_l: quantity("rest_co2_mg_l").optional(),
}

/** When there is light, and when the gas closes before it goes. */
export const dayFields = {
  photoperiod_h: quantity("photoperiod_h").default(gasDefaults.photoperiod_h),
  close_before_lights_off_min: quantity("close_before_lights_off_min").default(
    gasDefaults.close_before_lights_off_min,
  ),
  reach_fraction: quantity("reach_fraction").default(gasDefaults.reach_fraction),
}

/** The feed, by one of its units or as a multiple of what holds the level. */
export const feedFields = {
  feed_mg_min: quantity("feed_mg_min").optional(),
  feed_ml_min: quantity("feed_ml_min").optional(),
  feed_ratio: quantity("feed_ratio").default(gasDefaults.feed_ratio),
}

export const feedResult = {
  feed_mg_min: figure("feed_mg_min"),
  feed_ml_min: figure("feed_ml_min"),
  feed_ratio: figure("feed_ratio"),
  hold_feed_mg_min: figure("hold_feed_mg_min"),
}

/** What the same feed would do with nothing to throttle it. */
export const uncontrolledResult = {
  uncontrolled_co2_mg_l: figure("uncontrolled_co2_mg_l"),
  uncontrolled_limit_co2_mg_l: figure("uncontrolled_limit_co2_mg_l"),
}

/** What a feed that only holds the level would reach on a timer. */
export const holdOnlyResult = {
  hold_only_lights_on_co2_mg_l: figure("hold_only_lights_on_co2_mg_l"),
  hold_only_close_co2_mg_l: figure("hold_only_close_co2_mg_l"),
}

/** A day's course; minutes from when the gas opens, or from midnight where lights have hours. */
export const series = z.array(
  z.object({ t_min: figure("t_min"), co2_mg_l: figure("co2_mg_l"), ph: figure("ph") }),
)
