import { z } from "zod"
import { examplePlan, planFields } from "@/app/api/v1/plan/plan-fields"
import { catalogMatches } from "@/app/api/v1/plan/plan-result"
import { defineOperation } from "@/lib/api/define-operation"
import { planItems } from "@/lib/catalog"
import { systemPlan } from "@/lib/plan/system-plan"
import { roundSignificant } from "@/lib/units/figures"

export const matchCatalogItems = defineOperation({
  id: "matchCatalogItems",
  method: "POST",
  path: "/catalog/match",
  tag: "Catalogue",
  summary: "Which of your filters, reactors, cylinders and diffusers fit a tank",
  description:
    "Each is solved in this tank's own loop, and ranked with the reason and the margin. What does not fit is left out.",
  access: { kind: "key", scope: "catalog" },
  units: 5,
  request: z.strictObject(planFields),
  response: z.object({ matches: catalogMatches }),
  problems: ["out_of_domain"],
  example: {
    request: examplePlan,
    response: {
      matches: [
        {
          item_id: "item_01kbc0x7qzf0ra2w6v8n4m3h5t",
          name: "Fernhollow canister 1000",
          kind: "filter",
          rank: 1,
          fit: "possible",
          reason: "It moves 568 L/h through this loop and 398 when due for cleaning; 450 and 371 are needed.",
          margin: 0.07,
        },
      ],
    },
  },
  async run({ input, caller: { ctx } }) {
    const { result } = systemPlan({ ...input, catalog: await planItems({ ctx }) })
    return {
      matches: result.catalog_matches.map((match) => ({ ...match, margin: roundSignificant(match.margin) })),
    }
  },
})
