import type { Fake } from "../core/fake"
import { newId } from "../core/ids"
import type { Objects } from "../core/state"
import { currentPeriod } from "./renew"
import type { Subscription } from "./subscription-shape"

export type Schedule = Objects["subscription_schedule"]
export type Phase = Schedule["phases"][number]

/** A schedule that so far says only what the subscription does anyway. */
export function blankSchedule(fake: Fake, subscription: Subscription): Schedule {
  const now = fake.now(String(subscription.customer))
  const period = currentPeriod(subscription)
  const items = subscription.items.data.map(({ price, quantity }) => ({ price, quantity }))
  return {
    id: newId("sub_sched"),
    object: "subscription_schedule",
    application: null,
    billing_mode: subscription.billing_mode,
    canceled_at: null,
    completed_at: null,
    created: now,
    current_phase: { start_date: period.start, end_date: period.end },
    customer: String(subscription.customer),
    customer_account: null,
    default_settings: {
      application_fee_percent: null,
      billing_cycle_anchor: "automatic",
      billing_thresholds: null,
      collection_method: "charge_automatically",
      default_payment_method: null,
      description: null,
      invoice_settings: {
        account_tax_ids: null,
        custom_fields: null,
        days_until_due: null,
        description: null,
        footer: null,
        issuer: { type: "self" },
      },
      on_behalf_of: null,
      transfer_data: null,
    },
    end_behavior: "release",
    livemode: false,
    metadata: {},
    pause_schedules: [],
    phases: [phaseOf(items, period, subscription.metadata)],
    released_at: null,
    released_subscription: null,
    status: "active",
    subscription: subscription.id,
    test_clock: subscription.test_clock,
  }
}

export function phaseOf(
  items: { price: Objects["price"]; quantity?: number | undefined }[],
  span: { start: number; end: number },
  metadata: Record<string, string>,
): Phase {
  return {
    add_invoice_items: [],
    application_fee_percent: null,
    billing_cycle_anchor: null,
    billing_thresholds: null,
    collection_method: null,
    currency: items[0]!.price.currency,
    default_payment_method: null,
    default_tax_rates: [],
    description: null,
    discounts: [],
    end_date: span.end,
    invoice_settings: null,
    items: items.map(({ price, quantity }) => ({
      billing_thresholds: null,
      discounts: [],
      metadata: {},
      plan: price.id,
      price: price.id,
      ...(price.recurring?.usage_type !== "metered" && { quantity: quantity ?? 1 }),
      tax_rates: [],
    })),
    metadata,
    on_behalf_of: null,
    proration_behavior: "none",
    start_date: span.start,
    transfer_data: null,
    trial_end: null,
  }
}
