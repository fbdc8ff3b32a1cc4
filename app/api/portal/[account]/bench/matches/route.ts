import { z } from "zod"
import { planFields } from "@/app/api/v1/plan/plan-fields"
import { matchItems } from "@/lib/catalog"
import { accountEndpoint } from "../../../endpoint"

/** The account's own parts that fit the tank on the Bench. Never billed: the plan itself is worked out in the browser. */
export const POST = accountEndpoint({
  right: "bench.use",
  input: z.strictObject(planFields),
  run: async ({ ctx, input }) => ({ matches: await matchItems({ ctx, input }) }),
})
