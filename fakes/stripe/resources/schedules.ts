import { z } from "zod"
import { shifted } from "../billing/periods"
import { currentPeriod } from "../billing/renew"
import { releaseSchedule } from "../billing/schedule"
import { blankSchedule, type Phase, phaseOf } from "../billing/schedule-shape"
import { isLive } from "../billing/status"
import { invalid } from "../core/errors"
import { type Fake, idOf } from "../core/fake"
import { page as pageOf } from "../core/lists"
import { count, mergeMetadata, metadata, page, str } from "../core/params"
import { route } from "../core/route"
import type { Objects } from "../core/state"

const newPhase = z.strictObject({
  items: z
    .array(z.strictObject({ price: str, quantity: count.optional() }))
    .min(1)
    .max(20),
  start_date: count.optional(),
  end_date: count.optional(),
  duration: z
    .strictObject({ interval: z.enum(["day", "week", "month", "year"]), interval_count: count.default(1) })
    .optional(),
  metadata: metadata.optional(),
  proration_behavior: z.enum(["create_prorations", "none", "always_invoice"]).optional(),
})

export const schedules = [
  route(
    "POST",
    "/v1/subscription_schedules",
    z.strictObject({ from_subscription: str, metadata: metadata.optional() }),
    ({ fake, params }) => {
      const subscription = fake.get("subscription", params.from_subscription, "from_subscription")
      if (!isLive(subscription)) throw invalid("The subscription has ended.", "from_subscription")
      if (subscription.schedule) {
        throw invalid("The subscription already has a schedule.", "from_subscription")
      }
      const schedule = fake.put("subscription_schedule", blankSchedule(fake, subscription))
      schedule.metadata = mergeMetadata({}, params.metadata)
      subscription.schedule = schedule.id
      fake.emit("subscription_schedule.created", schedule)
      fake.emit("customer.subscription.updated", subscription, { schedule: null })
      return schedule
    },
  ),
  route(
    "GET",
    "/v1/subscription_schedules",
    z.strictObject({ ...page, customer: str.optional() }),
    ({ fake, params }) => {
      const found = fake
        .all("subscription_schedule")
        .filter((one) => !params.customer || one.customer === params.customer)
      return pageOf(found, params, "/v1/subscription_schedules")
    },
  ),
  route("GET", "/v1/subscription_schedules/:id", z.strictObject({}), ({ fake, path }) =>
    fake.get("subscription_schedule", path.id!),
  ),
  route(
    "POST",
    "/v1/subscription_schedules/:id",
    z.strictObject({
      phases: z.array(newPhase).min(1).max(10),
      end_behavior: z.enum(["release", "cancel"]).optional(),
      metadata: metadata.optional(),
      proration_behavior: z.enum(["create_prorations", "none", "always_invoice"]).optional(),
    }),
    ({ fake, params, path }) => {
      const schedule = fake.get("subscription_schedule", path.id!)
      if (schedule.status !== "active") throw invalid("Only an active schedule can be changed.")
      schedule.phases = phasesOf(fake, schedule, params.phases)
      schedule.end_behavior = params.end_behavior ?? schedule.end_behavior
      schedule.metadata = mergeMetadata(schedule.metadata ?? {}, params.metadata)
      fake.emit("subscription_schedule.updated", schedule)
      const subscription = fake.get("subscription", idOf(schedule.subscription)!)
      fake.emit("customer.subscription.updated", subscription, {})
      return schedule
    },
  ),
  route("POST", "/v1/subscription_schedules/:id/release", z.strictObject({}), ({ fake, path }) => {
    const schedule = fake.get("subscription_schedule", path.id!)
    if (schedule.status !== "active") throw invalid("Only an active schedule can be released.")
    releaseSchedule(fake, schedule)
    return schedule
  }),
]

/** The phases in order of time; the first must be the one that runs, since what has been cannot change. */
function phasesOf(
  fake: Fake,
  schedule: Objects["subscription_schedule"],
  wanted: z.output<typeof newPhase>[],
): Phase[] {
  const subscription = fake.get("subscription", idOf(schedule.subscription)!)
  const running = currentPeriod(subscription)
  const phases: Phase[] = []
  for (const [index, phase] of wanted.entries()) {
    const start = phase.start_date ?? phases.at(-1)?.end_date ?? running.start
    if (index === 0 && start !== running.start) {
      throw invalid("The first phase must start with the current one.", "phases[0][start_date]")
    }
    const end = phase.end_date ?? endOf(phase, start)
    if (end === undefined || end <= start) {
      throw invalid("A phase needs an end after its start.", `phases[${index}][end_date]`)
    }
    const items = phase.items.map((item, at) => ({
      price: fake.get("price", item.price, `phases[${index}][items][${at}][price]`),
      quantity: item.quantity,
    }))
    phases.push(phaseOf(items, { start, end }, mergeMetadata({}, phase.metadata)))
  }
  return phases
}

function endOf({ duration }: z.output<typeof newPhase>, start: number): number | undefined {
  return (
    duration &&
    shifted(start, { ...duration, meter: null, trial_period_days: null, usage_type: "licensed" }, 1)
  )
}
