export {
  changePlan,
  keepPlan,
  type PlanChange,
  type PlanChangeOutcome,
  type PlanChangePreview,
  previewPlanChange,
} from "./change-plan"
export { COMPARE_OVERAGE, compareOverage, type OverageDifference } from "./compare-overage"
export { endSubscription, setRenewal } from "./end-subscription"
export type { PaidPlanId } from "./ensure-prices"
export { type InvoiceRow, listInvoices } from "./list-invoices"
export { openBillingPortal } from "./open-billing-portal"
export { type Plan, type PlanId, planOf, plans, unitCapOf } from "./plans"
export { PROCESS_STRIPE_EVENT, processStripeEvent } from "./process-stripe-event"
export { type Delivery, type Receipt, receiveStripeEvent } from "./receive-stripe-event"
export { REPORT_METER_HOURS, reportOverage } from "./report-overage"
export { REVIEW_SUBSCRIPTIONS, reviewSubscriptions } from "./review-subscriptions"
export { SPENDING_CAP_MAX_MINOR, setSpendingCap } from "./set-spending-cap"
export { type Billing, showBilling } from "./show-billing"
export { startCheckout } from "./start-checkout"
