import { enqueueJob, type KeyMode, statement, withTenant } from "@/db"
import type { ErrorCode, FieldError } from "@/lib/errors"
import { GroupCommit } from "./group-commit"
import { WARN_OF_EXPOSED_KEY } from "./warn-of-exposed-key"

/** A call of a known key that was refused, as the account's request log keeps it. */
export interface Refusal {
  readonly account_id: string
  /** The id of the request, as its problem named it. */
  readonly id: string
  readonly key_id: string
  readonly mode: KeyMode
  readonly method: string
  readonly path: string
  readonly status: number
  readonly code: ErrorCode
  readonly detail: string
  readonly errors: readonly FieldError[]
}

const largestBatch = 200
const longestPath = 200

const shared = globalThis as typeof globalThis & { tarnwrightRefusals?: GroupCommit<Refusal, undefined> }

/** Notes a refusal for the request log. Nobody waits for it: without a database the note is lost, not the answer. */
export function logRefusal(refusal: Refusal): void {
  shared.tarnwrightRefusals ??= new GroupCommit(flush, largestBatch)
  shared.tarnwrightRefusals.commit({ ...refusal, path: refusal.path.slice(0, longestPath) }).catch(() => {})
}

async function flush(refusals: Refusal[]): Promise<undefined[]> {
  // A client may send one request id on all its calls: of those in one flush one is kept, or the whole would fail.
  const distinct = [
    ...new Map(refusals.map((refusal) => [`${refusal.account_id} ${refusal.id}`, refusal])).values(),
  ]
  await statement("app", {
    name: "log_refusals",
    text: "select log_refusals($1)",
    values: [JSON.stringify(distinct)],
  })
  await warnOfExposed(distinct)
  return refusals.map(() => undefined)
}

/** Keys that this process had a warning sent of, by the day. The job makes sure that there is one for all processes. */
const warned = new Set<string>()

/** @source PLATFORM 1.19 */
async function warnOfExposed(refusals: readonly Refusal[]): Promise<void> {
  const today = new Date().toISOString().slice(0, 10)
  for (const { account_id, key_id, id, code } of refusals) {
    const mark = `${today} ${key_id}`
    if (code !== "server_key_in_browser" || warned.has(mark)) continue
    if (warned.size > 10_000) warned.clear()
    warned.add(mark)
    const payload = { account_id, key_id, refusal_id: id }
    await withTenant(account_id, (trx) => enqueueJob(trx, { task: WARN_OF_EXPOSED_KEY, payload }))
  }
}
