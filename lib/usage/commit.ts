import { type KeyMode, statement } from "@/db"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import { newId } from "@/lib/id"
import { GroupCommit } from "./group-commit"

/** A call that has succeeded, or a run of such calls in a batch, whose answer waits for its usage to be durable. */
export interface MeteredRun {
  readonly account_id: string
  readonly key_id: string
  readonly mode: KeyMode
  readonly operation: string
  readonly calls: number
  /** Units of each call. */
  readonly units: number
  readonly request_id: string
}

/** How the account stands in its period after the run. */
export interface UsageReceipt {
  /** How many calls of the run, from its first, fit the cap and are charged. */
  readonly admitted: number
  readonly cap: number
  readonly used: number
  readonly resets_at: Date
}

/** Units that an account may spend on sandbox calls in a UTC day. */
export const SANDBOX_UNITS_A_DAY = 10_000

const largestBatch = 500

const shared = globalThis as typeof globalThis & { tarnwrightUsage?: GroupCommit<MeteredRun, UsageReceipt> }

/**
 * Writes the run into the ledger and adds its units to the account's period, as far as the cap admits it.
 *
 * Resolves only once both are durable, so that an answer sent afterwards is always metered.
 *
 * @throws DatabaseUnavailable when it could not be written: the call must then not be answered with success.
 */
export function commitUsage(run: MeteredRun): Promise<UsageReceipt> {
  shared.tarnwrightUsage ??= new GroupCommit(flush, largestBatch)
  return shared.tarnwrightUsage.commit(run)
}

async function flush(runs: MeteredRun[]): Promise<UsageReceipt[]> {
  const ids = runs.map(() => newId("call"))
  const rows = await statement<UsageReceipt & { run_id: string }>("app", {
    name: "meter_commit",
    text: "select * from meter_commit($1, $2, $3, $4, $5, $6, $7, $8, $9, $10)",
    values: [
      ids,
      runs.map((run) => run.account_id),
      runs.map((run) => run.key_id),
      runs.map((run) => run.mode),
      runs.map((run) => run.operation),
      runs.map((run) => run.calls),
      runs.map((run) => run.units),
      runs.map((run) => run.request_id),
      ENGINE_VERSION,
      SANDBOX_UNITS_A_DAY,
    ],
  })
  const receipts = new Map(rows.map((row) => [row.run_id, row]))
  return ids.map((id) => {
    const receipt = receipts.get(id)
    if (!receipt) throw new Error(`The ledger gave no receipt for ${id}`)
    return receipt
  })
}
