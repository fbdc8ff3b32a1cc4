import { planOf } from "@/lib/billing/plans"
import { TarnwrightError } from "@/lib/errors"
import type { Access } from "@/lib/keys"
import { commitUsage, rateLimiter, SANDBOX_UNITS_A_DAY, type UsageReceipt } from "@/lib/usage"
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
 * Makes the usage of a call that succeeded durable; until then nothing may be answered.
 *
 * @throws TarnwrightError `quota_reached`, or `rate_limited` in the sandbox, when the units do not fit.
 */
export async function charge(operation: AnyOperation, progress: Progress): Promise<void> {
  const { access } = progress
  if (!access || operation.units === 0) return
  const receipt = await commitUsage({
    account_id: access.account_id,
    key_id: access.key_id,
    mode: access.mode,
    operation: operation.id,
    units: operation.units,
    request_id: progress.requestId,
  })
  progress.receipt = receipt
  if (!receipt.admitted) throw capReached(access, receipt)
  progress.charged += operation.units
}

function capReached(access: Access, { cap, resets_at }: UsageReceipt): TarnwrightError {
  const until = resets_at.toISOString()
  if (access.mode === "sandbox") {
    return new TarnwrightError(
      "rate_limited",
      `The sandbox gives ${SANDBOX_UNITS_A_DAY} units a day, until ${until}.`,
      {
        retryAfterS: Math.max(1, Math.ceil((resets_at.getTime() - Date.now()) / 1000)),
      },
    )
  }
  return new TarnwrightError(
    "quota_reached",
    `This call does not fit into the ${cap} units of the period that ends at ${until}. The account's owner can ` +
      "choose a larger plan, or allow spending beyond it, on the billing page of the portal.",
  )
}
