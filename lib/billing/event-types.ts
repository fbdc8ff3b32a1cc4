/**
 * Events that change what an account may do or what its billing page shows. Whatever the type, the work is the same:
 * read the customer's state anew. @source PLATFORM 3.18
 */
export const syncedTypes: ReadonlySet<string> = new Set([
  "checkout.session.completed",
  "checkout.session.expired",
  "checkout.session.async_payment_failed",
  "checkout.session.async_payment_succeeded",
  "customer.subscription.created",
  "customer.subscription.updated",
  "customer.subscription.deleted",
  "customer.subscription.paused",
  "customer.subscription.resumed",
  "customer.subscription.trial_will_end",
  "customer.subscription.pending_update_applied",
  "customer.subscription.pending_update_expired",
  "invoice.created",
  "invoice.finalized",
  "invoice.finalization_failed",
  "invoice.paid",
  "invoice.payment_failed",
  "invoice.payment_action_required",
  "invoice.upcoming",
  "invoice.voided",
  "invoice.marked_uncollectible",
  "customer.updated",
  "customer.deleted",
  "customer.tax_id.created",
  "customer.tax_id.updated",
  "customer.tax_id.deleted",
])

/** Events that a person of ours has to look at: nothing follows from them by itself. */
export const alarmingTypes: ReadonlySet<string> = new Set([
  "charge.dispute.created",
  "v1.billing.meter.error_report_triggered",
  "v1.billing.meter.no_meter_found",
])
