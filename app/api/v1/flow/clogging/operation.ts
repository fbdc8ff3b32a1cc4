import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, figureOrNull } from "@/lib/api/quantity"
import { cloggingCourse, DEFAULT_STEPS } from "@/lib/flow/clogging-course"
import { exampleLoop, limit, reactorFields, verdict } from "../loop-fields"

export const flowClogging = defineCalculation({
  id: "flowClogging",
  path: "/flow/clogging",
  tag: "Flow",
  summary: "Flow and verdict from a clean filter to a blocked one",
  units: 2,
  request: z.strictObject({
    ...reactorFields,
    steps: z
      .int()
      .min(2)
      .max(101)
      .default(DEFAULT_STEPS)
      .meta({ description: "States of the media to look at, from clean to blocked", "x-unit": "1" }),
  }),
  result: {
    series: z.array(
      z.object({
        clogging: figure("clogging"),
        flow_l_h: figure("flow_l_h"),
        nozzle_velocity_m_s: figure("nozzle_velocity_m_s"),
        verdict,
      }),
    ),
    limit_clogging: figureOrNull("clogging"),
    limit_flow_l_h: figure("limit_flow_l_h"),
    limit,
  },
  uncertainty: {
    limit_clogging_low: figureOrNull("clogging"),
    limit_clogging_high: figureOrNull("clogging"),
  },
  example: { ...exampleLoop, reactor: { body_diameter_mm: 60, body_length_mm: 350 }, feed_mg_min: 63 },
  run: cloggingCourse,
})
