import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, figureOrNull } from "@/lib/api/quantity"
import { reactorVerdict } from "@/lib/flow/reactor-verdict"
import { exampleLoop, flowUncertainty, limit, reactorFields, reasons, verdict } from "../loop-fields"

export const flowReactor = defineCalculation({
  id: "flowReactor",
  path: "/flow/reactor",
  tag: "Flow",
  summary: "Whether a filter drives a reactor, with every reason",
  units: 2,
  request: z.strictObject(reactorFields),
  result: {
    flow_l_h: figure("flow_l_h"),
    flow_without_reactor_l_h: figure("flow_l_h"),
    turnover_per_h: figure("turnover_per_h").optional(),
    turnover_level: z.enum(["good", "acceptable", "low"]).optional(),
    body_velocity_m_s: figure("body_velocity_m_s"),
    nozzle_velocity_m_s: figure("nozzle_velocity_m_s"),
    bubble_rise_m_s: figure("bubble_rise_m_s"),
    required_length_m: figure("length_m"),
    holds_bubbles: z.boolean(),
    outlet_co2_mg_l: figure("outlet_co2_mg_l"),
    outlet_saturation_ratio: figure("outlet_saturation_ratio"),
    dissolution_fraction: figure("dissolution_fraction"),
    minimum_flow_l_h: figure("minimum_flow_l_h"),
    comfortable_flow_l_h: figure("flow_l_h"),
    maximum_flow_l_h: figure("flow_l_h"),
    limit,
    limit_clogging: figureOrNull("clogging"),
    fresh_cap_mg_min: figure("feed_mg_min"),
    aged_cap_mg_min: figure("feed_mg_min"),
    verdict,
    reasons,
    when_due: z
      .object({ flow_l_h: figure("flow_l_h"), verdict, reasons })
      .meta({ description: "The same reactor when the filter is due for cleaning" }),
  },
  uncertainty: { ...flowUncertainty, dissolution_fraction_low: figure("dissolution_fraction") },
  example: { ...exampleLoop, reactor: { body_diameter_mm: 60, body_length_mm: 350 }, feed_mg_min: 63 },
  run: reactorVerdict,
})
