import Stripe from "stripe"
import { type Plan, type PlanId, planOf } from "./plans"
import { stripe } from "./stripe-client"

export type PaidPlanId = Exclude<PlanId, "nano">

/** Event name of the one meter: units beyond the plan, as totals of an hour. */
export const OVERAGE_EVENT = "tarnwright_overage_units"
export const CUSTOMER_KEY = "stripe_customer_id"
export const UNITS_KEY = "units"

export interface PlanPrices {
  /** Paid ahead each month. */
  readonly base: string
  /** Paid afterwards by the meter; null where the plan stops at its units. */
  readonly overage: string | null
}

/**
 * The Stripe prices of a plan, made on first use from the plans' table. When the table has another amount than Stripe,
 * a new price takes over the lookup key; those who subscribed before keep what they agreed to.
 */
export async function ensurePrices(id: PaidPlanId): Promise<PlanPrices> {
  const plan = planOf(id)
  const keys = { base: `tarnwright_${id}_month`, overage: `tarnwright_${id}_overage` }
  const { data } = await stripe().prices.list({ lookup_keys: Object.values(keys), active: true })
  const ensure = async (key: string, amount: string, terms: Partial<Stripe.PriceCreateParams>) => {
    const holder = data.find((price) => price.lookup_key === key)
    return holder?.unit_amount_decimal?.toString() === amount
      ? holder.id
      : makePrice(id, key, holder?.id, terms)
  }
  const base = await ensure(keys.base, String(plan.price_minor), {
    unit_amount: plan.price_minor,
    recurring: { interval: "month" },
  })
  const perUnit = overagePerUnit(plan)
  if (perUnit === null) return { base, overage: null }
  const overage = await ensure(keys.overage, perUnit, {
    unit_amount_decimal: Stripe.Decimal.from(perUnit),
    recurring: { interval: "month", usage_type: "metered", meter: await ensureMeter() },
  })
  return { base, overage }
}

/** The meter that overage is reported to. @source PLATFORM 3.11 */
export async function ensureMeter(): Promise<string> {
  for await (const meter of stripe().billing.meters.list({ status: "active", limit: 100 })) {
    if (meter.event_name === OVERAGE_EVENT) return meter.id
  }
  const made = await stripe().billing.meters.create(
    {
      display_name: "Units beyond the plan",
      event_name: OVERAGE_EVENT,
      default_aggregation: { formula: "sum" },
      // With a window Stripe keeps the newest total of each hour, so that one may be sent again.
      event_time_window: "hour",
      customer_mapping: { type: "by_id", event_payload_key: CUSTOMER_KEY },
      value_settings: { event_payload_key: UNITS_KEY },
    },
    { idempotencyKey: `meter:${OVERAGE_EVENT}` },
  )
  return made.id
}

/** Cents for one unit, as Stripe writes it: `0.08` for 80 cents a thousand. */
function overagePerUnit({ overage_minor_per_1000 }: Plan): string | null {
  return overage_minor_per_1000 === null ? null : String(overage_minor_per_1000 / 1000)
}

async function makePrice(
  plan: PaidPlanId,
  key: string,
  replaced: string | undefined,
  terms: Partial<Stripe.PriceCreateParams>,
): Promise<string> {
  const product = await ensureProduct(plan, key)
  const made = await stripe().prices.create(
    {
      currency: "usd",
      product,
      lookup_key: key,
      transfer_lookup_key: true,
      tax_behavior: "exclusive",
      metadata: { plan },
      ...terms,
    },
    // Two processes that find the same want make one price.
    { idempotencyKey: `price:${key}:after:${replaced ?? "none"}` },
  )
  return made.id
}

/** A product has an id of our choice, so that two processes cannot make it twice. */
async function ensureProduct(plan: PaidPlanId, key: string): Promise<string> {
  const { name } = planOf(plan)
  const extra = key.endsWith("_overage")
  try {
    const { id } = await stripe().products.retrieve(key)
    return id
  } catch (error) {
    if (!isMissing(error)) throw error
  }
  const made = await stripe().products.create(
    {
      id: key,
      name: extra ? `Tarnwright ${name}, units beyond the plan` : `Tarnwright ${name}`,
      metadata: { plan },
      ...(extra && { unit_label: "unit" }),
    },
    { idempotencyKey: `product:${key}` },
  )
  return made.id
}

function isMissing(error: unknown): boolean {
  return error instanceof Stripe.errors.StripeInvalidRequestError && error.code === "resource_missing"
}
