import type { Call } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { commitUsage, type UsageReceipt } from "./commit"

/** Stands for a key in the ledger where somebody signed in did what costs units. */
export const PORTAL_KEY_ID = "portal"

/**
 * Meters what a person of the account did in the portal, as a live call of the API would be.
 *
 * @throws TarnwrightError `quota_reached` when the units do not fit.
 */
export async function spendUnits({
  ctx,
  input,
}: Call<{ readonly operation: string; readonly units: number }>): Promise<void> {
  const receipt = await commitUsage({
    account_id: ctx.account_id,
    key_id: PORTAL_KEY_ID,
    mode: "live",
    calls: 1,
    request_id: ctx.request_id ?? newId("request"),
    ...input,
  })
  if (receipt.admitted === 0) throw quotaReached(receipt)
}

/** The refusal of what does not fit into the units of a period. */
export function quotaReached({ cap, resets_at }: UsageReceipt): TarnwrightError {
  return new TarnwrightError(
    "quota_reached",
    `This call does not fit into the ${cap} units of the period that ends at ${resets_at.toISOString()}. The ` +
      "account's owner can choose a larger plan, or allow spending beyond it, on the billing page of the portal.",
  )
}
