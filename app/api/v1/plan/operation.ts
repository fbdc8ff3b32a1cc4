import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { planItems } from "@/lib/catalog"
import { systemPlan } from "@/lib/plan/system-plan"
import { examplePlan, planFields } from "./plan-fields"
import { planResult, planUncertainty } from "./plan-result"

export const plan = defineCalculation({
  id: "plan",
  path: "/plan",
  tag: "Plan",
  summary: "The whole system, from the tank to the parts list",
  description:
    "Method with the reasons for and against each, set-point, feed, lead time, cylinder, pressure, flow, reactor, room " +
    "safety, parts, and how to build, run and mend it. With `use_catalog` your own parts that fit are ranked.",
  units: 5,
  request: z.strictObject({
    ...planFields,
    use_catalog: z.boolean().default(false).meta({ description: "Match the parts of your catalogue" }),
  }),
  result: planResult,
  uncertainty: planUncertainty,
  example: examplePlan,
  run({ use_catalog, ...input }, caller) {
    if (!use_catalog) return systemPlan(input)
    return planItems(caller).then((catalog) => systemPlan({ ...input, catalog }))
  },
})
