import type Stripe from "stripe"
import { withTenant } from "@/db"
import { authorize } from "@/lib/accounts"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { ensurePrices, type PaidPlanId, type PlanPrices } from "./ensure-prices"
import { type PlanId, planOf } from "./plans"
import { reachStripe } from "./reach-stripe"
import { isRunning } from "./service-state"
import { stripe } from "./stripe-client"

export interface PlanChange {
  readonly plan: PaidPlanId
  /** Moment from which a larger plan is paid, Unix seconds, as its preview said; now if absent. */
  readonly proration_date?: number
}

/** What a change will do: a larger plan is paid for the rest of the period and comes at once, a smaller one comes with the next. */
export type PlanChangePreview =
  | {
      readonly kind: "larger"
      readonly due_minor: number
      readonly currency: string
      readonly proration_date: number
    }
  | { readonly kind: "smaller"; readonly at: Date }

export type PlanChangeOutcome =
  | { readonly outcome: "changed" }
  /** The card refused. Nothing changes until the invoice at `url` is paid. */
  | { readonly outcome: "payment_needed"; readonly url: string }
  | { readonly outcome: "scheduled"; readonly at: Date }

/** Says what {@link changePlan} would do, and what a larger plan costs for the rest of the period. */
export async function previewPlanChange({ ctx, input }: Call<PlanChange>): Promise<PlanChangePreview> {
  authorize(ctx.actor, "billing.manage")
  const running = await runningSubscription(ctx, input.plan)
  if (!running.larger) return { kind: "smaller", at: running.period_end }
  const proration_date = input.proration_date ?? Math.floor(ctx.now.getTime() / 1000)
  const invoice = await reachStripe(async () =>
    stripe().invoices.createPreview({
      subscription: running.id,
      subscription_details: {
        items: await itemsFor(running, input.plan),
        proration_behavior: "always_invoice",
        proration_date,
      },
    }),
  )
  return { kind: "larger", due_minor: invoice.amount_due, currency: invoice.currency, proration_date }
}

/**
 * Moves a running subscription to another paid plan. Units that are spent stay spent. @source PLATFORM 3.21
 *
 * @throws TarnwrightError `forbidden` to anyone but an owner; `conflict` without a subscription, or when the plan is
 *   the one that it has; `unavailable` when Stripe does not answer
 */
export async function changePlan({ ctx, input }: Call<PlanChange>): Promise<PlanChangeOutcome> {
  authorize(ctx.actor, "billing.manage")
  const running = await runningSubscription(ctx, input.plan)
  const outcome = await reachStripe(() =>
    running.larger ? goLarger(running, input) : goSmaller(running, input.plan),
  )
  await withTenant(ctx.account_id, (trx) =>
    recordAct(trx, ctx, {
      action: "billing.plan_change_asked",
      target: running.id,
      detail: { plan: input.plan, outcome: outcome.outcome },
    }),
  )
  return outcome
}

interface Running {
  readonly id: string
  readonly period_end: Date
  readonly larger: boolean
}

async function runningSubscription(ctx: Ctx, wanted: PlanId): Promise<Running> {
  const stored = await withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("subscription")
      .select(["stripe_subscription_id", "plan", "status", "current_period_end", "cancel_at_period_end"])
      .where("account_id", "=", ctx.account_id)
      .executeTakeFirst(),
  )
  if (!stored || !isRunning(stored.status)) {
    throw new TarnwrightError("conflict", "There is no subscription to change. Choose a plan first.")
  }
  if (stored.plan === wanted) throw new TarnwrightError("conflict", "The subscription has this plan already.")
  if (stored.cancel_at_period_end) {
    throw new TarnwrightError(
      "conflict",
      "The subscription ends with its period. Keep it first, then change its plan.",
    )
  }
  const larger = planOf(wanted).price_minor > planOf(stored.plan).price_minor
  return { id: stored.stripe_subscription_id, period_end: stored.current_period_end, larger }
}

async function goLarger(running: Running, { plan, proration_date }: PlanChange): Promise<PlanChangeOutcome> {
  await dropSchedule(running.id)
  const changed = await stripe().subscriptions.update(running.id, {
    items: await itemsFor(running, plan),
    proration_behavior: "always_invoice",
    payment_behavior: "pending_if_incomplete",
    ...(proration_date !== undefined && { proration_date }),
    expand: ["latest_invoice"],
  })
  if (!changed.pending_update) return { outcome: "changed" }
  const invoice = changed.latest_invoice as Stripe.Invoice
  if (!invoice.hosted_invoice_url) throw new Error(`Invoice ${invoice.id} has no page`)
  return { outcome: "payment_needed", url: invoice.hosted_invoice_url }
}

async function goSmaller(running: Running, plan: PaidPlanId): Promise<PlanChangeOutcome> {
  await dropSchedule(running.id)
  const prices = await ensurePrices(plan)
  const schedule = await stripe().subscriptionSchedules.create({ from_subscription: running.id })
  const [current] = schedule.phases
  await stripe().subscriptionSchedules.update(schedule.id, {
    end_behavior: "release",
    phases: [
      {
        items: current!.items.map(({ price, quantity }) => ({
          price: typeof price === "string" ? price : price.id,
          ...(quantity !== undefined && { quantity }),
        })),
        start_date: current!.start_date,
        end_date: current!.end_date,
      },
      {
        items: [{ price: prices.base, quantity: 1 }, ...(prices.overage ? [{ price: prices.overage }] : [])],
        duration: { interval: "month", interval_count: 1 },
        proration_behavior: "none",
        metadata: { plan },
      },
    ],
  })
  return { outcome: "scheduled", at: running.period_end }
}

/** Takes back a change that waits for the end of the period. Does nothing when none does. */
export async function keepPlan({ ctx }: Pick<Call<never>, "ctx">): Promise<void> {
  authorize(ctx.actor, "billing.manage")
  const stored = await withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("subscription")
      .select("stripe_subscription_id as id")
      .where("account_id", "=", ctx.account_id)
      .executeTakeFirst(),
  )
  if (!stored) return
  await reachStripe(() => dropSchedule(stored.id))
  await withTenant(ctx.account_id, (trx) =>
    recordAct(trx, ctx, { action: "billing.plan_change_taken_back", target: stored.id }),
  )
}

/** Takes back a change of plan that waits for the end of the period, where one does. */
export async function dropSchedule(subscription: string): Promise<void> {
  const { schedule } = await stripe().subscriptions.retrieve(subscription)
  if (schedule)
    await stripe().subscriptionSchedules.release(typeof schedule === "string" ? schedule : schedule.id)
}

/** The items that turn the subscription's into those of a plan: the base for the base, the metered for the metered. */
async function itemsFor(running: Running, plan: PaidPlanId): Promise<Stripe.SubscriptionUpdateParams.Item[]> {
  const [prices, subscription] = await Promise.all([
    ensurePrices(plan),
    stripe().subscriptions.retrieve(running.id),
  ])
  const old = (usage: "licensed" | "metered") =>
    subscription.items.data.find((item) => item.price.recurring?.usage_type === usage)
  return [...replaced(old("licensed"), prices.base), ...replaced(old("metered"), prices.overage)]
}

function replaced(
  old: Stripe.SubscriptionItem | undefined,
  price: PlanPrices["base"] | null,
): Stripe.SubscriptionUpdateParams.Item[] {
  if (price === null) return old ? [{ id: old.id, deleted: true }] : []
  return [{ ...(old && { id: old.id }), price }]
}
