import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { bubbleRate } from "@/lib/gas/bubble-rate"
import { gasDefaults } from "@/lib/gas/defaults"

export const gasBubbleRate = defineCalculation({
  id: "gasBubbleRate",
  path: "/gas/bubble-rate",
  tag: "Gas",
  summary: "Bubbles a second, millilitres and milligrams a minute",
  description: "Send one of `bubbles_per_s`, `feed_ml_min` and `feed_mg_min`.",
  units: 1,
  request: z.strictObject({
    outlet_diameter_mm: quantity("outlet_diameter_mm").default(gasDefaults.outlet_diameter_mm),
    bubbles_per_s: quantity("bubbles_per_s").optional(),
    feed_ml_min: quantity("feed_ml_min").optional(),
    feed_mg_min: quantity("feed_mg_min").optional(),
    temperature_c: quantity("temperature_c").default(gasDefaults.temperature_c),
    counter_pressure_bar: quantity("counter_pressure_bar").default(gasDefaults.counter_pressure_bar),
  }),
  result: {
    bubbles_per_s: figure("bubbles_per_s"),
    feed_ml_min: figure("feed_ml_min"),
    feed_mg_min: figure("feed_mg_min"),
    bubble_volume_ul: figure("bubble_volume_ul"),
    mg_per_bubble: figure("mg_per_bubble"),
    syringe_10_ml_s: figure("syringe_10_ml_s"),
  },
  uncertainty: {
    feed_low_mg_min: figure("feed_low_mg_min"),
    feed_high_mg_min: figure("feed_high_mg_min"),
    bubbles_per_s_low: figure("bubbles_per_s_low"),
    bubbles_per_s_high: figure("bubbles_per_s_high"),
  },
  example: { bubbles_per_s: 2 },
  run: bubbleRate,
})
