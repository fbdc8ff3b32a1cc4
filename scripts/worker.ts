/** The process that does the work outside the request: takes jobs from the queue until it is asked to end. */
import { run, type TaskList } from "graphile-worker"
import { closePools } from "@/db"
import { env } from "@/lib/env"
import { deliverMail, type Mail, SEND_MAIL } from "@/lib/mail"
import { loadLocalEnv } from "./stack/local-env"

loadLocalEnv()

/** A job may run twice, when its answer is lost: each task is safe to repeat. */
const taskList: TaskList = {
  [SEND_MAIL]: (payload, { job }) => deliverMail(payload as Mail, `job-${job.id}`),
}

const runner = await run({
  connectionString: env().DATABASE_WORKER_URL,
  concurrency: 5,
  noHandleSignals: true,
  taskList,
})
for (const signal of ["SIGTERM", "SIGINT"] as const) process.once(signal, () => runner.stop())
console.log("ready")
await runner.promise
await closePools()
