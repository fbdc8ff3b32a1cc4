import type { z } from "zod"
import type { usageInput } from "@/app/api/portal/schemas"
import type { Ctx } from "@/lib/context"
import { type Quota, quotaOf, type UsageRow, usageBy } from "@/lib/usage"

export interface Usage {
  readonly quota: Quota
  /** When the quota was read: what a forecast reckons from. */
  readonly at: Date
  /** First and last day, inclusive, in UTC. */
  readonly from: string
  readonly to: string
  readonly rows: readonly UsageRow[]
}

/** An account's usage of the last days and how its quota stands. A day without calls has no row. */
export async function usageOf({
  ctx,
  input: { mode, days, by },
}: {
  ctx: Ctx
  input: z.output<typeof usageInput>
}): Promise<Usage> {
  const to = dayBefore(ctx.now, 0)
  const from = dayBefore(ctx.now, days - 1)
  const [quota, rows] = await Promise.all([
    quotaOf({ ctx, input: { mode } }),
    usageBy({ ctx, input: { from, to, by, mode } }),
  ])
  return { quota, at: ctx.now, from, to, rows }
}

function dayBefore(now: Date, days: number): string {
  return new Date(now.getTime() - days * 86_400_000).toISOString().slice(0, 10)
}
