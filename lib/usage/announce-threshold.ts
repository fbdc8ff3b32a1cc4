import { sql } from "kysely"
import { asWorker } from "@/db"
import { notifyOwners } from "@/lib/mail"
import { publishEvent } from "@/lib/webhooks"

/** Name of the job that tells of a threshold; the group commit queues it, `scripts/worker.ts` has its task. */
export const ANNOUNCE_THRESHOLD = "announce_threshold"

/** A threshold that the group commit noted. `period_start` as the database wrote it, since it may have microseconds. */
export interface ReachedThreshold {
  readonly account_id: string
  readonly period_start: string
  readonly percent: number
}

/** Tells owners by mail and endpoints by webhook, once: what was told is noted in the same transaction. */
export async function announceThreshold(which: ReachedThreshold): Promise<void> {
  await asWorker(async (trx) => {
    const reached = await trx
      .updateTable("usage_threshold")
      .set({ notified_at: sql<Date>`now()` })
      .where("account_id", "=", which.account_id)
      .where("period_start", "=", sql<Date>`${which.period_start}::timestamptz`)
      .where("percent", "=", which.percent as 80 | 100)
      .where("notified_at", "is", null)
      .returningAll()
      .executeTakeFirst()
    if (!reached) return
    const { account_id, percent, units, unit_cap } = reached
    const period_end = reached.period_end.toISOString()
    await notifyOwners(trx, account_id, ({ account_name, portal_url }) => ({
      template: "usage_threshold",
      data: { account_name, percent, units, unit_cap, period_end, usage_url: `${portal_url}/usage` },
    }))
    const period_start = reached.period_start.toISOString()
    await publishEvent(trx, account_id, "usage.threshold_reached", {
      percent,
      units,
      unit_cap,
      period_start,
      period_end,
    })
  })
}
