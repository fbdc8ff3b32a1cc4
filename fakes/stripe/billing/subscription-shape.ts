import { newId } from "../core/ids"
import type { Objects } from "../core/state"
import type { Item } from "./lines"

export type Subscription = Objects["subscription"]

export interface NewSubscription {
  customer: string
  items: {
    price: Objects["price"]
    quantity?: number | undefined
    metadata?: Record<string, string> | undefined
  }[]
  now: number
  testClock: string | null
  metadata: Record<string, string>
  defaultPaymentMethod: string | null
  automaticTax: boolean
  description: string | null
  cancelAtPeriodEnd: boolean
}

/** A subscription before its first payment, with every field that the SDK's type promises. */
export function blankSubscription(input: NewSubscription, end: number): Subscription {
  const id = newId("sub")
  const items = input.items.map((item) => newItem(id, { ...item, now: input.now, end }))
  return {
    id,
    object: "subscription",
    application: null,
    application_fee_percent: null,
    automatic_tax: {
      disabled_reason: null,
      enabled: input.automaticTax,
      liability: input.automaticTax ? { type: "self" } : null,
    },
    billing_cycle_anchor: input.now,
    billing_cycle_anchor_config: null,
    billing_mode: { flexible: { proration_discounts: "included" }, type: "flexible" },
    billing_schedules: [],
    billing_thresholds: null,
    cancel_at: input.cancelAtPeriodEnd ? end : null,
    cancel_at_period_end: input.cancelAtPeriodEnd,
    canceled_at: null,
    cancellation_details: { comment: null, feedback: null, feedback_option: null, reason: null },
    collection_method: "charge_automatically",
    created: input.now,
    currency: items[0]!.price.currency,
    customer: input.customer,
    customer_account: null,
    days_until_due: null,
    default_payment_method: input.defaultPaymentMethod,
    default_source: null,
    default_tax_rates: [],
    description: input.description,
    discounts: [],
    ended_at: null,
    invoice_settings: {
      account_tax_ids: null,
      custom_fields: null,
      description: null,
      footer: null,
      issuer: { type: "self" },
    },
    items: { object: "list", data: items, has_more: false, url: `/v1/subscription_items?subscription=${id}` },
    latest_invoice: null,
    livemode: false,
    managed_payments: null,
    metadata: input.metadata,
    next_pending_invoice_item_invoice: null,
    on_behalf_of: null,
    pause_collection: null,
    payment_settings: {
      payment_method_options: null,
      payment_method_types: null,
      save_default_payment_method: "off",
    },
    pending_invoice_item_interval: null,
    pending_setup_intent: null,
    pending_update: null,
    schedule: null,
    start_date: input.now,
    status: "incomplete",
    test_clock: input.testClock,
    transfer_data: null,
    trial_end: null,
    trial_settings: {
      end_behavior: { billing_cycle_anchor: null, missing_payment_method: "create_invoice" },
    },
    trial_start: null,
  }
}

export function newItem(
  subscription: string,
  input: NewSubscription["items"][number] & { now: number; end: number; start?: number },
): Item {
  const metered = input.price.recurring?.usage_type === "metered"
  return {
    id: newId("si"),
    object: "subscription_item",
    billing_thresholds: null,
    created: input.now,
    current_period_end: input.end,
    current_period_start: input.start ?? input.now,
    current_trial: null,
    discounts: [],
    metadata: input.metadata ?? {},
    plan: planOf(input.price),
    price: input.price,
    ...(!metered && { quantity: input.quantity ?? 1 }),
    subscription,
    tax_rates: [],
  }
}

/** The older name for a price, which the API still sends along. */
function planOf(price: Objects["price"]): Item["plan"] {
  return {
    id: price.id,
    object: "plan",
    active: price.active,
    amount: price.unit_amount,
    amount_decimal: price.unit_amount_decimal,
    billing_scheme: price.billing_scheme,
    created: price.created,
    currency: price.currency,
    interval: price.recurring!.interval,
    interval_count: price.recurring!.interval_count,
    livemode: false,
    metadata: price.metadata,
    meter: price.recurring!.meter,
    nickname: price.nickname,
    product: price.product,
    tiers_mode: price.tiers_mode,
    transform_usage: null,
    trial_period_days: null,
    usage_type: price.recurring!.usage_type,
  }
}
