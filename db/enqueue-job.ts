import { sql } from "kysely"
import type { Trx } from "./client"

/** Work for the worker process; `scripts/worker.ts` has a task for each name. */
export interface Job {
  readonly task: string
  readonly payload: Readonly<Record<string, unknown>>
  /** At most one job with the key waits: a later one takes its place. */
  readonly key?: string
  /** Default: at once. */
  readonly run_at?: Date
  /** Jobs of one queue run one after another. */
  readonly queue?: string
}

/** Puts a job on the queue in the caller's transaction: it runs if, and only if, that commits. */
export async function enqueueJob(trx: Trx, { task, payload, key, run_at, queue }: Job): Promise<void> {
  await sql`select enqueue_job(${task}, ${JSON.stringify(payload)}::json, ${key ?? null}, ${run_at ?? null},
    ${queue ?? null})`.execute(trx)
}
