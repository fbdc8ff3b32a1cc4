import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure } from "@/lib/api/quantity"
import { operatingPoint } from "@/lib/flow/operating-point"
import { exampleLoop, flowUncertainty, loopFields } from "../loop-fields"

const curve = z.array(z.object({ flow_l_h: figure("flow_l_h"), head_m: figure("head_m") }))

export const flowOperatingPoint = defineCalculation({
  id: "flowOperatingPoint",
  path: "/flow/operating-point",
  tag: "Flow",
  summary: "What a filter pushes through its loop, and where its head goes",
  units: 2,
  request: z.strictObject(loopFields),
  result: {
    flow_l_h: figure("flow_l_h"),
    velocity_m_s: figure("velocity_m_s"),
    reynolds: figure("reynolds"),
    head_m: figure("head_m"),
    head_budget: z
      .array(z.object({ element: z.string(), head_m: figure("head_m") }))
      .meta({ description: "Where the head goes; adds up to `head_m`" }),
    turnover_per_h: figure("turnover_per_h").optional(),
    turnover_level: z.enum(["good", "acceptable", "low"]).optional(),
    clean_flow_l_h: figure("flow_l_h"),
    due_flow_l_h: figure("flow_l_h"),
    hoses: z.array(
      z.object({
        hose: z.enum(["hose", "return_hose"]),
        velocity_m_s: figure("velocity_m_s"),
        reynolds: figure("reynolds"),
        regime: z.enum(["laminar", "transitional", "turbulent"]),
      }),
    ),
    pump_curve: curve,
    loop_curve: curve,
    due_loop_curve: curve.meta({ description: "The loop when the filter is due for cleaning" }),
  },
  uncertainty: flowUncertainty,
  example: exampleLoop,
  run: operatingPoint,
})
