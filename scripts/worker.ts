/** The process that does the work outside the request: takes jobs from the queue until it is asked to end. */
import { setTimeout as pause } from "node:timers/promises"
import { parseCronItems, type Runner, run, type TaskList } from "graphile-worker"
import { closePools } from "@/db"
import {
  COMPARE_OVERAGE,
  compareOverage,
  PROCESS_STRIPE_EVENT,
  processStripeEvent,
  REPORT_METER_HOURS,
  REVIEW_SUBSCRIPTIONS,
  reportOverage,
  reviewSubscriptions,
} from "@/lib/billing"
import { deleteClosedAccounts } from "@/lib/closing"
import { type EnquiryCopy, SEND_ENQUIRY_COPY, sendEnquiryCopy } from "@/lib/enquiries"
import { env } from "@/lib/env"
import { BUILD_EXPORT, buildExport } from "@/lib/exports"
import { remindOfExpiry } from "@/lib/keys"
import { deliverMail, type Mail, SEND_MAIL } from "@/lib/mail"
import {
  ANNOUNCE_THRESHOLD,
  announceThreshold,
  deleteExpired,
  describeDrift,
  dropOldPartitions,
  type ExposedKey,
  makePartitions,
  type ReachedThreshold,
  reconcileUsage,
  rollUpUsage,
  WARN_OF_EXPOSED_KEY,
  warnOfExposedKey,
} from "@/lib/usage"
import { DELIVER_WEBHOOK, deliverWebhook, recoverDeliveries } from "@/lib/webhooks"
import { loadLocalEnv } from "./stack/local-env"

loadLocalEnv()

/** A job may run twice, when its answer is lost: each task is safe to repeat. */
const taskList: TaskList = {
  [SEND_MAIL]: (payload, { job }) => deliverMail(payload as Mail, `job-${job.id}`),
  [SEND_ENQUIRY_COPY]: (payload) => sendEnquiryCopy(payload as EnquiryCopy),
  [PROCESS_STRIPE_EVENT]: (payload) => processStripeEvent({ input: payload as { event_id: string } }),
  [REVIEW_SUBSCRIPTIONS]: async () => void (await reviewSubscriptions({ now: new Date() })),
  [REPORT_METER_HOURS]: (payload) =>
    reportOverage({ ...(payload as { account_id?: string }), now: new Date() }),
  async [COMPARE_OVERAGE]() {
    for (const difference of await compareOverage({ now: new Date() })) {
      console.error(`overage differs: ${JSON.stringify(difference)}`)
    }
  },
  [ANNOUNCE_THRESHOLD]: (payload) => announceThreshold(payload as ReachedThreshold),
  [WARN_OF_EXPOSED_KEY]: (payload) => warnOfExposedKey(payload as ExposedKey),
  roll_up_usage: async () => void (await rollUpUsage()),
  async reconcile_usage() {
    for (const drift of await reconcileUsage()) console.error(describeDrift(drift))
  },
  make_partitions: () => makePartitions(),
  drop_old_partitions: async () => void (await dropOldPartitions()),
  [BUILD_EXPORT]: (payload) => buildExport(payload as { account_id: string; export_id: string }),
  delete_closed_accounts: async () => void (await deleteClosedAccounts({ now: new Date() })),
  delete_expired: async () => void (await deleteExpired()),
  remind_of_expiry: async () => void (await remindOfExpiry()),
  recover_deliveries: async () => void (await recoverDeliveries()),
}

/** Minutes and hours are UTC. */
const timetable = parseCronItems([
  { task: REVIEW_SUBSCRIPTIONS, match: "7 * * * *" },
  { task: REPORT_METER_HOURS, match: "4 * * * *" },
  { task: COMPARE_OVERAGE, match: "50 2 * * *", options: { backfillPeriod: 86_400_000 } },
  { task: "roll_up_usage", match: "1,11,21,31,41,51 * * * *" },
  { task: "recover_deliveries", match: "3,8,13,18,23,28,33,38,43,48,53,58 * * * *" },
  { task: "remind_of_expiry", match: "17 * * * *" },
  { task: "make_partitions", match: "5 0 * * *", options: { backfillPeriod: 86_400_000 } },
  { task: "drop_old_partitions", match: "25 1 * * *" },
  { task: "delete_expired", match: "35 * * * *" },
  { task: "delete_closed_accounts", match: "40 * * * *" },
  { task: "reconcile_usage", match: "45 1 * * *", options: { backfillPeriod: 86_400_000 } },
])

/** Webhooks have hands of their own: receivers that are slow to answer must not hold up mail. */
const queues = [
  { taskList, parsedCronItems: timetable, concurrency: 5 },
  {
    taskList: {
      [DELIVER_WEBHOOK]: (payload) => deliverWebhook(payload as { account_id: string; delivery_id: string }),
    } satisfies TaskList,
    parsedCronItems: [],
    concurrency: 10,
  },
]

const ending = new AbortController()
const runners = new Set<Runner>()
for (const signal of ["SIGTERM", "SIGINT"] as const) {
  process.once(signal, () => {
    ending.abort()
    for (const runner of runners) runner.stop().catch(() => {})
  })
}

let waiting = queues.length
await Promise.all(queues.map(workOn))
await closePools()

/**
 * Takes jobs until the worker is asked to end. Each round lasts until then, or until the database has been gone for
 * longer than the queue's own patience; then the next one waits for it to come back.
 */
async function workOn(queue: (typeof queues)[number]): Promise<void> {
  while (!ending.signal.aborted) {
    let runner: Runner | undefined
    try {
      await makePartitions()
      runner = await run({ connectionString: env().DATABASE_WORKER_URL, noHandleSignals: true, ...queue })
      runners.add(runner)
      waiting -= 1
      if (waiting === 0) console.log("ready")
      if (ending.signal.aborted) await runner.stop()
      await runner.promise
    } catch (error) {
      console.error(`The queue cannot be read: ${(error as Error).message}`)
      await pause(1_000, undefined, { signal: ending.signal }).catch(() => {})
    } finally {
      if (runner) runners.delete(runner)
    }
  }
}
