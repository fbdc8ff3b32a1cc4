import { type Fake, idOf } from "../core/fake"
import type { Subscription } from "./subscription-shape"

type Status = "incomplete_expired" | "active" | "past_due" | "unpaid" | "canceled" | "paused"
type Reason = "cancellation_requested" | "payment_failed"

/** Moves a subscription to a status and sends the event that the change has in the API. */
export function setStatus(fake: Fake, subscription: Subscription, status: Status, reason?: Reason): void {
  const before = subscription.status
  if (before === status) return
  const now = fake.now(idOf(subscription.customer))
  subscription.status = status
  if (status === "canceled" || status === "incomplete_expired") {
    subscription.ended_at = now
    subscription.canceled_at ??= now
    subscription.cancellation_details = {
      comment: subscription.cancellation_details?.comment ?? null,
      feedback: subscription.cancellation_details?.feedback ?? null,
      feedback_option: null,
      reason: subscription.cancellation_details?.reason ?? reason ?? null,
    }
  }
  fake.changed()
  if (status === "canceled") fake.emit("customer.subscription.deleted", subscription)
  else if (status === "paused") fake.emit("customer.subscription.paused", subscription)
  else if (before === "paused") fake.emit("customer.subscription.resumed", subscription)
  else fake.emit("customer.subscription.updated", subscription, { status: before })
}

/** Whether the subscription still runs, well or badly. */
export function isLive(subscription: Subscription): boolean {
  return !["canceled", "incomplete", "incomplete_expired"].includes(subscription.status)
}
