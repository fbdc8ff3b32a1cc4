import { type Fake, idOf } from "../core/fake"
import type { Item } from "./lines"
import type { Schedule } from "./schedule-shape"
import { newItem, type Subscription } from "./subscription-shape"

/**
 * The items of the period that begins at `span.start`: those of the phase that begins with it, or else the old ones.
 * A schedule whose last phase has passed lets its subscription go.
 */
export function itemsOfPeriod(
  fake: Fake,
  subscription: Subscription,
  span: { start: number; end: number },
): Item[] {
  const kept = subscription.items.data.map((item) => ({
    ...item,
    current_period_start: span.start,
    current_period_end: span.end,
  }))
  const schedule = fake.state.objects.subscription_schedule[idOf(subscription.schedule) ?? ""]
  if (!schedule) return kept
  const phase = schedule.phases.find((one) => one.start_date <= span.start && span.start < one.end_date)
  if (!phase) {
    releaseSchedule(fake, schedule)
    return kept
  }
  schedule.current_phase = { start_date: phase.start_date, end_date: phase.end_date }
  if (phase.start_date !== span.start) return kept
  subscription.metadata = { ...subscription.metadata, ...phase.metadata }
  return phase.items.map(({ price: id, quantity }) => {
    const same = kept.find((item) => item.price.id === id)
    const price = fake.get("price", String(id))
    return same ?? newItem(subscription.id, { price, quantity, now: span.start, ...span })
  })
}

export function releaseSchedule(fake: Fake, schedule: Schedule): void {
  const subscription = fake.state.objects.subscription[idOf(schedule.subscription) ?? ""]
  schedule.status = "released"
  schedule.current_phase = null
  schedule.released_at = fake.now(idOf(schedule.customer))
  schedule.released_subscription = idOf(schedule.subscription)
  schedule.subscription = null
  fake.emit("subscription_schedule.released", schedule)
  if (!subscription) return
  subscription.schedule = null
  fake.emit("customer.subscription.updated", subscription, { schedule: schedule.id })
}
