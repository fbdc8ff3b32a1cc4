import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, figureOrNull, quantity } from "@/lib/api/quantity"
import { controllerDay } from "@/lib/gas/controller-day"
import { gasDefaults } from "@/lib/gas/defaults"
import { khError, phError, waterFields } from "../../carbonate/water-fields"
import { dayFields, feedFields, feedResult, series, tankFields, uncontrolledResult } from "../tank-fields"

export const gasController = defineCalculation({
  id: "gasController",
  path: "/gas/controller",
  tag: "Gas",
  summary: "A day of the pH controller",

  units: 2,
  request: z.strictObject({
    ...tankFields,
    ...dayFields,
    photoperiod_h: quantity("photoperiod_h").optional(),
    ...feedFields,
    ...phError,
    ...khError,
    temperature_error_c: waterFields.temperature_error_c,
    lights_on_h: quantity("lights_on_h").default(gasDefaults.lights_on_h),
    lights_off_h: quantity("lights_off_h").optional(),
    open_before_lights_min: quantity("open_before_lights_min").optional(),
    setpoint_ph: quantity("setpoint_ph").optional(),
    hysteresis_ph: quantity("hysteresis_ph").default(gasDefaults.hysteresis_ph),
    delay_min: quantity("delay_min").default(gasDefaults.delay_min),
    probe_lag_min: quantity("probe_lag_min").default(gasDefaults.probe_lag_min),
  }),
  result: {
    ...feedResult,
    ...uncontrolledResult,
    duty_fraction: figure("duty_fraction"),
    cycles_per_h: figure("cycles_per_h"),
    ideal_duty_fraction: figure("ideal_duty_fraction"),
    ideal_cycles_per_h: figure("ideal_cycles_per_h"),
    switches_per_day: figure("switches_per_day"),
    valve_open_min: figure("valve_open_min"),
    overshoot_mg_l: figure("overshoot_mg_l"),
    max_co2_mg_l: figure("max_co2_mg_l"),
    hold_low_co2_mg_l: figureOrNull("hold_low_co2_mg_l"),
    min_ph: figure("min_ph"),
    daily_use_g_day: figure("daily_use_g_day"),
    setpoint_ph: figure("setpoint_ph"),
    setpoint_co2_mg_l: figure("setpoint_co2_mg_l"),
    open_before_lights_min: figure("open_before_lights_min"),
    close_before_lights_off_min: figure("close_before_lights_off_min"),
    reached_after_min: figureOrNull("reached_after_min"),
    lights_on_co2_mg_l: figure("lights_on_co2_mg_l"),
    series,
  },
  uncertainty: {
    max_co2_low_mg_l: figure("max_co2_low_mg_l"),
    max_co2_high_mg_l: figure("max_co2_high_mg_l"),
  },
  example: { volume_l: 180, surface_area_m2: 0.4, kh_dkh: 4 },
  run: controllerDay,
})
