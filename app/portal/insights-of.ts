import type { z } from "zod"
import type { insightsInput } from "@/app/api/portal/schemas"
import type { Ctx } from "@/lib/context"
import { type TankInsights, tankInsights } from "@/lib/insights"

export interface Insights extends TankInsights {
  /** First and last day, inclusive, in UTC. */
  readonly from: string
  readonly to: string
}

/** What the tanks of the last days look like that an account's widgets were asked about. */
export async function insightsOf({
  ctx,
  input: { days },
}: {
  ctx: Ctx
  input: z.output<typeof insightsInput>
}): Promise<Insights> {
  const to = ctx.now.toISOString().slice(0, 10)
  const from = new Date(ctx.now.getTime() - (days - 1) * 86_400_000).toISOString().slice(0, 10)
  return { from, to, ...(await tankInsights({ ctx, input: { from, to } })) }
}
