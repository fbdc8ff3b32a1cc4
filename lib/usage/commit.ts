import { type KeyMode, statement } from "@/db"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import { newId } from "@/lib/id"
import { GroupCommit } from "./group-commit"

/** A call that has succeeded and whose answer waits for its usage to be durable. */
export interface MeteredCall {
  readonly account_id: string
  readonly key_id: string
  readonly mode: KeyMode
  readonly operation: string
  readonly units: number
  readonly request_id: string
}

/** How the account stands in its period after the call. `admitted` false: the cap held it back, nothing was charged. */
export interface UsageReceipt {
  readonly admitted: boolean
  readonly cap: number
  readonly used: number
  readonly resets_at: Date
}

/** Units that an account may spend on sandbox calls in a UTC day. */
export const SANDBOX_UNITS_A_DAY = 10_000

const largestBatch = 500

const shared = globalThis as typeof globalThis & { tarnwrightUsage?: GroupCommit<MeteredCall, UsageReceipt> }

/**
 * Writes the call into the ledger and adds its units to the account's period, unless the cap holds it back.
 *
 * Resolves only once both are durable, so that an answer sent afterwards is always metered.
 *
 * @throws DatabaseUnavailable when it could not be written: the call must then not be answered with success.
 */
export function commitUsage(call: MeteredCall): Promise<UsageReceipt> {
  shared.tarnwrightUsage ??= new GroupCommit(flush, largestBatch)
  return shared.tarnwrightUsage.commit(call)
}

async function flush(calls: MeteredCall[]): Promise<UsageReceipt[]> {
  const ids = calls.map(() => newId("call"))
  const rows = await statement<UsageReceipt & { call_id: string }>("app", {
    name: "meter_commit",
    text: "select * from meter_commit($1, $2, $3, $4, $5, $6, $7, $8, $9)",
    values: [
      ids,
      calls.map((call) => call.account_id),
      calls.map((call) => call.key_id),
      calls.map((call) => call.mode),
      calls.map((call) => call.operation),
      calls.map((call) => call.units),
      calls.map((call) => call.request_id),
      ENGINE_VERSION,
      SANDBOX_UNITS_A_DAY,
    ],
  })
  const receipts = new Map(rows.map((row) => [row.call_id, row]))
  return ids.map((id) => {
    const receipt = receipts.get(id)
    if (!receipt) throw new Error(`The ledger gave no receipt for ${id}`)
    return receipt
  })
}
