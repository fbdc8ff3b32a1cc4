import { sql } from "kysely"
import { type KeyMode, withTenant } from "@/db"
import type { Ctx } from "@/lib/context"
import { SANDBOX_UNITS_A_DAY } from "./commit"

export interface Quota {
  readonly used: number
  readonly cap: number
  readonly period_start: Date
  readonly period_end: Date
}

/** How much of its period's units the account has used: a UTC day in the sandbox, the billing period in live mode. */
export function quotaOf({ ctx, input }: { ctx: Ctx; input: { readonly mode: KeyMode } }): Promise<Quota> {
  return withTenant(ctx.account_id, async (trx) => {
    const { rows } = await sql<Quota>`
      select p.period_start, p.period_end, coalesce(u.units, 0) as used,
             case ${input.mode} when 'sandbox' then ${SANDBOX_UNITS_A_DAY}::bigint else a.unit_cap end as cap
        from account a
        cross join lateral metering_period(${input.mode}, a.period_anchor, now()) p
        left join usage_counter u
          on u.account_id = a.id and u.mode = ${input.mode} and u.period_start = p.period_start
       where a.id = ${ctx.account_id}`.execute(trx)
    const [quota] = rows
    if (!quota) throw new Error("The account of this call has gone")
    return quota
  })
}
