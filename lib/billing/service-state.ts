import { type PlanId, planOf, unitCapOf } from "./plans"

/** What an account may do on the strength of its subscription. */
export interface ServiceState {
  readonly plan: PlanId
  /** Units that the account may spend in a period; 0 stops live calls with 402. */
  readonly unit_cap: number
}

/** What decides it. */
export interface Standing {
  readonly plan: PlanId
  readonly status: string
  readonly past_due_since: Date | null
}

const GRACE_DAYS = 7

/** When an account that owes money loses its overage. */
export function graceEnd(past_due_since: Date): Date {
  return new Date(past_due_since.getTime() + GRACE_DAYS * 86_400_000)
}

/**
 * What a subscription gives.
 *
 * @source PLATFORM 3.20. Differs from it in one point: an ended subscription falls back to the free plan, which
 *   PRODUCT gives to every account, rather than to nothing.
 */
export function serviceState(standing: Standing, overage_cap_minor: number, now: Date): ServiceState {
  const plan = planOf(standing.plan)
  switch (standing.status) {
    case "active":
    case "trialing":
      return { plan: standing.plan, unit_cap: unitCapOf(plan, overage_cap_minor) }
    case "past_due": {
      const late = standing.past_due_since !== null && now >= graceEnd(standing.past_due_since)
      return { plan: standing.plan, unit_cap: unitCapOf(plan, late ? 0 : overage_cap_minor) }
    }
    case "unpaid":
    case "paused":
      return { plan: standing.plan, unit_cap: 0 }
    default:
      return { plan: "nano", unit_cap: planOf("nano").included_units }
  }
}

/** Whether the subscription still runs, well or badly: a second one must not be started beside it. */
export function isRunning(status: string): boolean {
  return ["active", "trialing", "past_due", "unpaid", "paused"].includes(status)
}

/**
 * The subscription that decides, of all that a customer ever had: one that runs before one that does not, then the
 * newest. One that was never paid decides nothing.
 */
export function deciding<One extends { readonly status: string; readonly created: Date }>(
  subscriptions: readonly One[],
): One | undefined {
  return subscriptions
    .filter(({ status }) => isRunning(status) || status === "canceled")
    .sort(
      (a, b) =>
        Number(isRunning(b.status)) - Number(isRunning(a.status)) ||
        b.created.getTime() - a.created.getTime(),
    )
    .at(0)
}
