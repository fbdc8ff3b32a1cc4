import { withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { lockBilling } from "./lock"
import { type PlanId, planOf } from "./plans"
import { isRunning, serviceState } from "./service-state"

/** Largest ceiling that can be set by oneself, in US cents. */
export const SPENDING_CAP_MAX_MINOR = 1_000_000

/**
 * Sets the most that the account may spend beyond its plan in a period; 0 stops it at the included units.
 *
 * @throws TarnwrightError `forbidden` to anyone but an owner; `validation_failed` for an amount out of range;
 *   `plan_limit_reached` on a plan that has no units beyond the included ones, or without a subscription to bill
 */
export async function setSpendingCap({
  ctx,
  input,
}: Call<{ readonly overage_cap_minor: number }>): Promise<{ unit_cap: number }> {
  authorize(ctx.actor, "billing.manage")
  const { overage_cap_minor: wanted } = input
  if (!Number.isInteger(wanted) || wanted < 0 || wanted > SPENDING_CAP_MAX_MINOR) {
    const detail = `Give an amount from 0 to ${SPENDING_CAP_MAX_MINOR / 100} US dollars.`
    throw new TarnwrightError("validation_failed", detail, {
      errors: [{ pointer: "/overage_cap_minor", detail }],
    })
  }
  return withTenant(ctx.account_id, async (trx) => {
    await lockBilling(trx, ctx.account_id)
    const stored = await trx
      .selectFrom("subscription")
      .select(["plan", "status", "past_due_since"])
      .where("account_id", "=", ctx.account_id)
      .executeTakeFirst()
    const plan = stored && planOf(stored.plan)
    if (!stored || !isRunning(stored.status) || plan?.overage_minor_per_1000 === null) {
      throw new TarnwrightError(
        "plan_limit_reached",
        "Units beyond the plan need a paid plan. Choose one first.",
      )
    }
    const { unit_cap } = serviceState({ ...stored, plan: stored.plan as PlanId }, wanted, ctx.now)
    const before = await trx
      .selectFrom("account")
      .select(["overage_cap_minor", "unit_cap"])
      .where("id", "=", ctx.account_id)
      .forUpdate()
      .executeTakeFirstOrThrow()
    await trx
      .updateTable("account")
      .set({ overage_cap_minor: wanted, unit_cap })
      .where("id", "=", ctx.account_id)
      .execute()
    await recordAct(trx, ctx, {
      action: "billing.spending_cap_set",
      detail: { overage_cap_minor_before: before.overage_cap_minor, overage_cap_minor: wanted, unit_cap },
    })
    return { unit_cap }
  })
}
