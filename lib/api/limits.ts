import ipaddr from "ipaddr.js"
import { planOf } from "@/lib/billing/plans"
import { TarnwrightError } from "@/lib/errors"
import type { Access } from "@/lib/keys"
import { commitUsage, quotaReached, rateLimiter, SANDBOX_UNITS_A_DAY, type UsageReceipt } from "@/lib/usage"
import type { AnyOperation } from "./define-operation"
import type { Progress } from "./progress"

const sandboxCallsPerS = 5

/**
 * Counts the call against its account's rate.
 *
 * @throws TarnwrightError `rate_limited`.
 */
export async function limitRate(access: Access, progress: Progress): Promise<void> {
  const points = access.mode === "sandbox" ? sandboxCallsPerS : planOf(access.plan).calls_per_s
  const state = await rateLimiter().take(`${access.account_id}:${access.mode}`, { points, window_s: 1 })
  progress.limits.push({ name: "burst", quota: points, window_s: 1, ...state })
  if (!state.allowed) {
    throw new TarnwrightError(
      "rate_limited",
      `You may call ${points} times a second. Wait a second and try again.`,
      {
        retryAfterS: Math.max(1, state.reset_s),
      },
    )
  }
}

/**
 * Counts the call against what one network address may ask of the operation.
 *
 * @throws TarnwrightError `rate_limited`.
 */
export async function limitAddress({ id, perAddress }: AnyOperation, address: string): Promise<void> {
  if (!perAddress) return
  const state = await rateLimiter().take(`${id}:${placeOf(address)}`, perAddress)
  if (state.allowed) return
  const wait_s = Math.max(1, state.reset_s)
  const { points, window_s } = perAddress
  throw new TarnwrightError(
    "rate_limited",
    `One address may call this ${points} times in ${window_s} seconds. Try again in ${wait_s} seconds.`,
    { retryAfterS: wait_s },
  )
}

/** A household's own: an IPv4 address, or the /64 that an IPv6 address stands in. @source RFC 6177, section 2 */
function placeOf(address: string): string {
  if (!ipaddr.isValid(address)) return address
  const parsed = ipaddr.process(address)
  return parsed.kind() === "ipv4" ? parsed.toString() : parsed.toByteArray().slice(0, 8).join(".")
}

/**
 * Makes the usage of a call that succeeded durable; until then nothing may be answered.
 *
 * @throws TarnwrightError `quota_reached`, or `rate_limited` in the sandbox, when the units do not fit.
 */
export async function charge(operation: AnyOperation, progress: Progress): Promise<void> {
  const { refused } = await chargeRun(operation, 1, progress)
  if (refused) throw refused
}

/**
 * Makes the usage of the calculations of a batch durable, in their order: a run of one operation is one row of the
 * ledger. Returns for each why it was refused, or undefined: once the cap holds one back, it holds back the rest.
 */
export async function chargeInTurn(
  operations: readonly AnyOperation[],
  progress: Progress,
): Promise<(TarnwrightError | undefined)[]> {
  const runs: { operation: AnyOperation; calls: number }[] = []
  for (const operation of operations) {
    const last = runs.at(-1)
    if (last?.operation === operation) last.calls += 1
    else runs.push({ operation, calls: 1 })
  }
  const charged = await Promise.all(
    runs.map(async ({ operation, calls }) => ({ calls, ...(await chargeRun(operation, calls, progress)) })),
  )
  return charged.flatMap(({ calls, admitted, refused }) =>
    Array.from({ length: calls }, (_, index) => (index < admitted ? undefined : refused)),
  )
}

/** How many calls of a run, from its first, are charged, and why the others are not. */
interface ChargedRun {
  readonly admitted: number
  readonly refused?: TarnwrightError
}

/** Makes the usage of calls of one operation that succeeded durable, as far as the cap admits them. */
async function chargeRun(operation: AnyOperation, calls: number, progress: Progress): Promise<ChargedRun> {
  const { access } = progress
  if (!access || operation.units === 0) return { admitted: calls }
  const receipt = await commitUsage({
    account_id: access.account_id,
    key_id: access.key_id,
    mode: access.mode,
    operation: operation.id,
    calls,
    units: operation.units,
    request_id: progress.requestId,
  })
  progress.receipt = receipt
  progress.charged += receipt.admitted * operation.units
  if (receipt.admitted === calls) return { admitted: calls }
  return { admitted: receipt.admitted, refused: capReached(access, receipt) }
}

function capReached(access: Access, receipt: UsageReceipt): TarnwrightError {
  if (access.mode === "live") return quotaReached(receipt)
  const { resets_at } = receipt
  return new TarnwrightError(
    "rate_limited",
    `The sandbox gives ${SANDBOX_UNITS_A_DAY} units a day, until ${resets_at.toISOString()}.`,
    { retryAfterS: Math.max(1, Math.ceil((resets_at.getTime() - Date.now()) / 1000)) },
  )
}
