import { asWorker } from "@/db"
import { lockBilling } from "./lock"
import { syncAccount } from "./sync-account"

/** Name of the hourly job; `scripts/worker.ts` has its task and its hour. */
export const REVIEW_SUBSCRIPTIONS = "review_subscriptions"

/**
 * Reads anew every account whose state changes by the clock alone (a payment owed for a week, a period that has ended)
 * or that has waited a day, in which a lost event would have mended itself.
 *
 * @throws AggregateError when some could not be read; the others are done
 */
export async function reviewSubscriptions({ now }: { now: Date }): Promise<{ reviewed: number }> {
  const accounts = await asWorker((trx) =>
    trx
      .selectFrom("subscription")
      .innerJoin("account", "account.id", "subscription.account_id")
      .select(["account.id as account_id", "account.stripe_customer_id as customer"])
      .where("account.stripe_customer_id", "is not", null)
      .where("subscription.status", "!=", "canceled")
      .where((where) =>
        where.or([
          where("subscription.past_due_since", "is not", null),
          where("subscription.current_period_end", "<", now),
          where("subscription.updated_at", "<", new Date(now.getTime() - 86_400_000)),
        ]),
      )
      .execute(),
  )
  const problems: unknown[] = []
  for (const { account_id, customer } of accounts) {
    const review = asWorker(async (trx) => {
      await lockBilling(trx, account_id)
      await syncAccount(trx, { account_id, customer: customer! }, now)
    })
    await review.catch((error) => problems.push(error))
  }
  if (problems.length > 0)
    throw new AggregateError(problems, `${problems.length} subscriptions could not be reviewed`)
  return { reviewed: accounts.length }
}
