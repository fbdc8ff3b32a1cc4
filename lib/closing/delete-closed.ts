import { asWorker, type Trx } from "@/db"
import { endSubscription } from "@/lib/billing"
import { GRACE_DAYS } from "./close"

/** What names its account without hanging on it, so that it does not go with it by itself. */
const loose = ["usage_event", "usage_hour", "webhook_delivery", "audit_log"] as const

/**
 * Deletes every account whose days of grace are over, with all that is in it. The people keep their sign-ins.
 *
 * @returns the ids of the accounts that were deleted
 */
export async function deleteClosedAccounts({ now }: { now: Date }): Promise<string[]> {
  const over = new Date(now.getTime() - GRACE_DAYS * 86_400_000)
  const due = await asWorker((trx) => dueOf(trx, over).execute())
  const deleted: string[] = []
  for (const { id } of due) {
    await endSubscription(id)
    const gone = await asWorker(async (trx) => {
      // It may have been taken back since.
      const still = await dueOf(trx, over).where("id", "=", id).forUpdate().executeTakeFirst()
      if (!still) return false
      for (const table of loose) await trx.deleteFrom(table).where("account_id", "=", id).execute()
      await trx.deleteFrom("account").where("id", "=", id).execute()
      return true
    })
    if (gone) deleted.push(id)
  }
  return deleted
}

function dueOf(trx: Trx, over: Date) {
  return trx
    .selectFrom("account")
    .select("id")
    .where("status", "=", "closing")
    .where("closing_since", "<=", over)
}
