import type Stripe from "stripe"
import { z } from "zod"
import { type PlanId, plans } from "./plans"

/** What we keep of a subscription, read from Stripe's object. */
export interface SubscriptionSnapshot {
  readonly id: string
  readonly customer: string
  readonly plan: PlanId
  /** Stripe's word; the list is open, so an unknown one must be expected. */
  readonly status: string
  readonly created: Date
  readonly billing_cycle_anchor: Date
  readonly current_period_start: Date
  readonly current_period_end: Date
  readonly cancel_at_period_end: boolean
  /** Plan that it goes to when the period ends; null when it stays. */
  readonly scheduled_plan: PlanId | null
}

/** What we keep of an invoice. */
export interface InvoiceSnapshot {
  readonly id: string
  readonly subscription: string | null
  readonly number: string | null
  readonly status: string
  readonly amount_minor: number
  readonly currency: string
  readonly hosted_url: string | null
  readonly issued_at: Date
}

const instant = z
  .number()
  .int()
  .positive()
  .transform((seconds) => new Date(seconds * 1000))
const reference = z.union([z.string(), z.object({ id: z.string() }).transform(({ id }) => id)])

// Periods are on the items and not on the subscription since API version 2025-03-31 (PLATFORM 3.19).
const subscription = z.object({
  id: z.string(),
  customer: reference,
  status: z.string(),
  created: instant,
  billing_cycle_anchor: instant,
  cancel_at_period_end: z.boolean(),
  schedule: z
    .object({
      phases: z.array(
        z.object({ start_date: instant, metadata: z.record(z.string(), z.string()).nullish() }),
      ),
    })
    .nullable(),
  items: z.object({
    data: z
      .array(
        z.object({
          current_period_start: instant,
          current_period_end: instant,
          price: z.object({
            metadata: z.record(z.string(), z.string()),
            recurring: z.object({ usage_type: z.string() }).nullable(),
          }),
        }),
      )
      .min(1),
  }),
})

const invoice = z.object({
  id: z.string(),
  number: z.string().nullable(),
  status: z.string(),
  total: z.number().int(),
  currency: z.string(),
  created: instant,
  hosted_invoice_url: z.string().nullish(),
  status_transitions: z.object({ finalized_at: instant.nullable() }),
  parent: z.object({ subscription_details: z.object({ subscription: reference }).nullish() }).nullable(),
})

/**
 * Reads a subscription of ours, which must have been fetched with its `schedule` expanded.
 *
 * @throws Error that names the field, when Stripe's shape is not the one we know or no price of ours is in it
 */
export function subscriptionSnapshot(object: Stripe.Subscription): SubscriptionSnapshot {
  const { items, schedule, ...fields } = read(subscription, object, "subscription")
  // The metered item's period is the one that the allowance counts in (PLATFORM 3.19); a plan without one has its base.
  const item = items.data.find((one) => one.price.recurring?.usage_type === "metered") ?? items.data[0]!
  const plan = items.data.map((one) => one.price.metadata.plan).find((id) => id !== undefined)
  if (!isPlan(plan))
    throw new Error(`Subscription ${fields.id} has no price of a plan of ours (plan: ${plan})`)
  const { current_period_start, current_period_end } = item
  const next = schedule?.phases.find((phase) => phase.start_date >= current_period_end)?.metadata?.plan
  const scheduled_plan = isPlan(next) && next !== plan ? next : null
  return { ...fields, plan, current_period_start, current_period_end, scheduled_plan }
}

/** Whether any price in it is of a plan of ours; others of the same Stripe account are none of our business. */
export function isOurs(object: Stripe.Subscription): boolean {
  return object.items.data.some((item) => isPlan(item.price.metadata.plan))
}

/** Reads an invoice. @throws Error that names the field, when Stripe's shape is not the one we know */
export function invoiceSnapshot(object: Stripe.Invoice): InvoiceSnapshot {
  const known = read(invoice, object, "invoice")
  return {
    id: known.id,
    subscription: known.parent?.subscription_details?.subscription ?? null,
    number: known.number,
    status: known.status,
    amount_minor: known.total,
    currency: known.currency,
    hosted_url: known.hosted_invoice_url ?? null,
    issued_at: known.status_transitions.finalized_at ?? known.created,
  }
}

function read<Shape extends z.ZodType>(shape: Shape, object: { id: string }, kind: string): z.output<Shape> {
  const outcome = shape.safeParse(object)
  if (outcome.success) return outcome.data
  const problems = outcome.error.issues.map((issue) => `${issue.path.join(".")}: ${issue.message}`).join("; ")
  throw new Error(`Stripe's ${kind} ${object.id} has another shape than expected: ${problems}`)
}

function isPlan(id: string | undefined): id is PlanId {
  return id !== undefined && Object.hasOwn(plans, id)
}
