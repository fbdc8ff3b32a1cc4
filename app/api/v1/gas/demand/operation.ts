import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { gasDefaults } from "@/lib/gas/defaults"
import { gasDemand as demand } from "@/lib/gas/demand"
import { dayFields, holdOnlyResult, tankFields, uncontrolledResult } from "../tank-fields"

export const gasDemand = defineCalculation({
  id: "gasDemand",
  path: "/gas/demand",
  tag: "Gas",
  summary: "Gas that a tank needs, and where it goes",

  units: 1,
  request: z.strictObject({
    ...tankFields,
    ...dayFields,
    wished_lead_min: quantity("wished_lead_min").default(gasDefaults.wished_lead_min),
  }),
  result: {
    hold_feed_mg_min: figure("hold_feed_mg_min"),
    hold_feed_ml_min: figure("hold_feed_ml_min"),
    daily_use_g_day: figure("daily_use_g_day"),
    loss_to_air_g_day: figure("loss_to_air_g_day"),
    plant_uptake_g_day: figure("plant_uptake_g_day"),
    respiration_g_day: figure("respiration_g_day"),
    escaped_g_day: figure("escaped_g_day"),
    ramp_feed_mg_min: figure("ramp_feed_mg_min"),
    ramp_feed_ml_min: figure("ramp_feed_ml_min"),
    ramp_ratio: figure("ramp_ratio"),
    ...uncontrolledResult,
    ...holdOnlyResult,
    exchange_per_h: figure("exchange_per_h"),
    air_co2_mg_l: figure("air_co2_mg_l"),
    dissolution_efficiency: figure("dissolution_efficiency"),
    target_ph: figure("target_ph"),
  },
  uncertainty: {
    hold_feed_low_mg_min: figure("hold_feed_low_mg_min"),
    hold_feed_high_mg_min: figure("hold_feed_high_mg_min"),
    daily_use_low_g_day: figure("daily_use_low_g_day"),
    daily_use_high_g_day: figure("daily_use_high_g_day"),
  },
  example: { volume_l: 180, surface_area_m2: 0.4, kh_dkh: 4 },
  run: demand,
})
