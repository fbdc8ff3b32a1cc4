import { sql } from "kysely"
import { type KeyMode, withTenant } from "@/db"
import type { Call } from "@/lib/context"

export interface UsageQuery {
  /** First and last day, inclusive, as `2026-12-01`, in UTC. */
  readonly from: string
  readonly to: string
  readonly by: "day" | "operation" | "key"
  readonly mode: KeyMode
}

export interface UsageRow {
  /** The day, the operation's id or the key's id. */
  readonly group: string
  readonly calls: number
  readonly units: number
}

const groups = {
  day: sql<string>`to_char(at at time zone 'UTC', 'YYYY-MM-DD')`,
  operation: sql<string>`operation`,
  key: sql<string>`key_id`,
}

/** What the account's ledger holds for the days, summed. A group without calls has no row. */
export function usageBy({ ctx, input }: Call<UsageQuery>): Promise<UsageRow[]> {
  const group = groups[input.by]
  return withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("usage_event")
      .select([
        group.as("group"),
        sql<number>`sum(calls)::bigint`.as("calls"),
        sql<number>`sum(units)::bigint`.as("units"),
      ])
      .where("account_id", "=", ctx.account_id)
      .where("mode", "=", input.mode)
      .where("at", ">=", sql<Date>`${input.from}::date::timestamp at time zone 'UTC'`)
      .where("at", "<", sql<Date>`(${input.to}::date + 1)::timestamp at time zone 'UTC'`)
      .groupBy(group)
      .orderBy(group)
      .execute(),
  )
}
