import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, figureOrNull } from "@/lib/api/quantity"
import { leadTime } from "@/lib/gas/lead-time"
import {
  dayFields,
  feedFields,
  feedResult,
  holdOnlyResult,
  series,
  tankFields,
  uncontrolledResult,
} from "../tank-fields"

export const gasLeadTime = defineCalculation({
  id: "gasLeadTime",
  path: "/gas/lead-time",
  tag: "Gas",
  summary: "When the gas opens before the lights",
  description:
    "`lead_time_min` is null where the feed never gets there in the dark hours; a caution says so.",
  units: 2,
  request: z.strictObject({
    ...tankFields,
    ...dayFields,
    ...feedFields,
  }),
  result: {
    ...feedResult,
    ...uncontrolledResult,
    lead_time_min: figureOrNull("lead_time_min"),
    reached_fraction: figure("reached_fraction"),
    open_before_lights_min: figureOrNull("open_before_lights_min"),
    close_before_lights_off_min: figure("close_before_lights_off_min"),
    start_co2_mg_l: figure("start_co2_mg_l"),
    lights_on_co2_mg_l: figure("lights_on_co2_mg_l"),
    close_co2_mg_l: figure("close_co2_mg_l"),
    lights_off_co2_mg_l: figure("lights_off_co2_mg_l"),
    ...holdOnlyResult,
    daily_use_g_day: figure("daily_use_g_day"),
    target_ph: figure("target_ph"),
    exchange_per_h: figure("exchange_per_h"),
    dissolution_efficiency: figure("dissolution_efficiency"),
    series,
  },
  uncertainty: {
    lead_time_low_min: figureOrNull("lead_time_low_min"),
    lead_time_high_min: figureOrNull("lead_time_high_min"),
  },
  example: { volume_l: 180, surface_area_m2: 0.4, kh_dkh: 4 },
  run: leadTime,
})
