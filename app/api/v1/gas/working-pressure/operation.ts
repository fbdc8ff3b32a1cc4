import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { gasDefaults } from "@/lib/gas/defaults"
import { workingPressure } from "@/lib/gas/working-pressure"
import { gasMethod } from "../tank-fields"

export const gasWorkingPressure = defineCalculation({
  id: "gasWorkingPressure",
  path: "/gas/working-pressure",
  tag: "Gas",
  summary: "Pressure to set at the reducer",

  units: 1,
  request: z.strictObject({
    method: gasMethod,
    depth_m: quantity("depth_m").default(gasDefaults.depth_m),
    check_valve_bar: quantity("check_valve_bar").default(gasDefaults.check_valve_bar),
    line_length_m: quantity("line_length_m").default(gasDefaults.line_length_m),
    line_diameter_mm: quantity("line_diameter_mm").default(gasDefaults.line_diameter_mm),
    pore_diameter_um: quantity("pore_diameter_um").optional(),
    feed_mg_min: quantity("feed_mg_min").optional(),
    setting_bar: quantity("setting_bar").optional(),
  }),
  result: {
    working_pressure_bar: figure("working_pressure_bar"),
    low_bar: figure("low_bar"),
    high_bar: figure("high_bar"),
    verdict: z
      .enum(["too_low", "unsteady", "sufficient", "hard_to_trim", "check_hose"])
      .meta({ description: "How the setting, or the recommended one, stands to what is needed" }),
    element_bar: figure("element_bar"),
    water_bar: figure("water_bar"),
    check_valve_bar: figure("check_valve_bar"),
    line_bar: figure("line_bar"),
  },
  uncertainty: {},
  example: { method: "inline_reactor" },
  run: workingPressure,
})
