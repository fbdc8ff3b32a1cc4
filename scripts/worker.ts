/** The process that does the work outside the request: takes jobs from the queue until it is asked to end. */
import { setTimeout as pause } from "node:timers/promises"
import { parseCronItems, type Runner, run, type TaskList } from "graphile-worker"
import { closePools } from "@/db"
import {
  PROCESS_STRIPE_EVENT,
  processStripeEvent,
  REVIEW_SUBSCRIPTIONS,
  reviewSubscriptions,
} from "@/lib/billing"
import { env } from "@/lib/env"
import { deliverMail, type Mail, SEND_MAIL } from "@/lib/mail"
import { loadLocalEnv } from "./stack/local-env"

loadLocalEnv()

/** A job may run twice, when its answer is lost: each task is safe to repeat. */
const taskList: TaskList = {
  [SEND_MAIL]: (payload, { job }) => deliverMail(payload as Mail, `job-${job.id}`),
  [PROCESS_STRIPE_EVENT]: (payload) => processStripeEvent({ input: payload as { event_id: string } }),
  [REVIEW_SUBSCRIPTIONS]: async () => void (await reviewSubscriptions({ now: new Date() })),
}

const timetable = parseCronItems([{ task: REVIEW_SUBSCRIPTIONS, match: "7 * * * *" }])

const ending = new AbortController()
let runner: Runner | undefined
for (const signal of ["SIGTERM", "SIGINT"] as const) {
  process.once(signal, () => {
    ending.abort()
    runner?.stop().catch(() => {})
  })
}

// Each round lasts until the worker is asked to end, or until the database has been gone for longer than the queue's
// own patience; then the next one waits for it to come back.
while (!ending.signal.aborted) {
  try {
    runner = await run({
      connectionString: env().DATABASE_WORKER_URL,
      concurrency: 5,
      noHandleSignals: true,
      parsedCronItems: timetable,
      taskList,
    })
    console.log("ready")
    if (ending.signal.aborted) await runner.stop()
    await runner.promise
  } catch (error) {
    console.error(`The queue cannot be read: ${(error as Error).message}`)
    await pause(1_000, undefined, { signal: ending.signal }).catch(() => {})
  }
}
await closePools()
