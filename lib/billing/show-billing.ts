import { withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import type { Call } from "@/lib/context"
import { type PlanId, planOf } from "./plans"
import { graceEnd, isRunning } from "./service-state"

/** How the account stands with us. Money in US cents. */
export interface Billing {
  readonly plan: PlanId
  /** Units that may be spent in a period, included ones and allowed ones beyond. */
  readonly unit_cap: number
  readonly overage_cap_minor: number
  /** The subscription that runs; null on the free plan and where the plan was given without one. */
  readonly subscription: {
    readonly status: string
    readonly current_period_start: Date
    readonly current_period_end: Date
    readonly cancel_at_period_end: boolean
    /** Plan that it goes to when the period ends; null when it stays. */
    readonly scheduled_plan: PlanId | null
    /** A payment is owed: since when, and until when everything works as before. */
    readonly owed: { readonly since: Date; readonly full_until: Date } | null
  } | null
  /** Whether the owner can allow spending beyond the plan. */
  readonly can_allow_overage: boolean
}

/** What the billing page shows, from our own state. @throws TarnwrightError `forbidden` */
export async function showBilling({ ctx }: Pick<Call<never>, "ctx">): Promise<Billing> {
  authorize(ctx.actor, "billing.read")
  const { account, stored } = await withTenant(ctx.account_id, async (trx) => ({
    account: await trx
      .selectFrom("account")
      .select(["plan", "unit_cap", "overage_cap_minor"])
      .where("id", "=", ctx.account_id)
      .executeTakeFirstOrThrow(),
    stored: await trx
      .selectFrom("subscription")
      .select([
        "status",
        "current_period_start",
        "current_period_end",
        "cancel_at_period_end",
        "scheduled_plan",
        "past_due_since",
      ])
      .where("account_id", "=", ctx.account_id)
      .executeTakeFirst(),
  }))
  const running = stored && isRunning(stored.status) ? stored : undefined
  return {
    plan: account.plan as PlanId,
    unit_cap: account.unit_cap,
    overage_cap_minor: account.overage_cap_minor,
    subscription: running ? toSubscription(running) : null,
    can_allow_overage: running !== undefined && planOf(account.plan).overage_minor_per_1000 !== null,
  }
}

function toSubscription(stored: StoredSubscription): Billing["subscription"] {
  const { past_due_since: since, scheduled_plan, ...fields } = stored
  return {
    ...fields,
    scheduled_plan: scheduled_plan as PlanId | null,
    owed: since && { since, full_until: graceEnd(since) },
  }
}

interface StoredSubscription {
  status: string
  current_period_start: Date
  current_period_end: Date
  cancel_at_period_end: boolean
  scheduled_plan: string | null
  past_due_since: Date | null
}
