import { createHash } from "node:crypto"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { claimIdempotencyKey, freeIdempotencyKey, keepAnswer } from "@/lib/usage"
import type { AnyOperation } from "./define-operation"
import type { Progress } from "./progress"
import type { ApiRequest, ApiResponse } from "./request"
import { replay } from "./respond"

/**
 * Answers at most once for an `Idempotency-Key`: a repeated call gets the first answer again and costs nothing.
 *
 * The key is kept for the account and its mode, 24 h. A refusal frees it.
 *
 * @source draft-ietf-httpapi-idempotency-key-header-06, section 2
 */
export async function once(
  operation: AnyOperation,
  request: ApiRequest,
  body: unknown,
  ctx: Ctx | undefined,
  progress: Progress,
  answer: () => Promise<ApiResponse>,
): Promise<ApiResponse> {
  const key = operation.stores ? keyOf(request) : undefined
  if (!key || !ctx || !progress.access) return answer()

  const fingerprint = createHash("sha256")
    .update(`${request.method} ${request.path} ${canonical(body)}`)
    .digest()
  const call = { mode: progress.access.mode, key, fingerprint }
  const kept = await claimIdempotencyKey({ ctx, input: call })
  if (kept) return replay(kept, progress)
  const response = await answer().catch(async (error) => {
    await freeIdempotencyKey({ ctx, input: call }).catch(() => {})
    throw error
  })
  // What is done and paid for is answered, even if the answer cannot be kept: a repeated call then waits in vain
  // for a minute and not a moment longer.
  const kept_body = response.body === null ? "" : Buffer.from(response.body).toString()
  await keepAnswer({ ctx, input: { ...call, status: response.status, body: kept_body } }).catch(() => {})
  return response
}

/** The header's value; clients send it bare and as a quoted string. */
function keyOf(request: ApiRequest): string | undefined {
  const header = request.header("idempotency-key")
  if (header === undefined) return undefined
  const key = header.replace(/^"(.*)"$/, "$1")
  if (!/^[\x21-\x7e]{1,255}$/.test(key)) {
    throw new TarnwrightError(
      "validation_failed",
      "An Idempotency-Key has 1 to 255 visible characters. A UUID is best.",
    )
  }
  return key
}

/** JSON with sorted members, so that their order in the body does not matter. */
function canonical(value: unknown): string {
  return JSON.stringify(value, (_, member) =>
    typeof member === "object" && member !== null && !Array.isArray(member)
      ? Object.fromEntries(Object.entries(member).sort(([one], [other]) => (one < other ? -1 : 1)))
      : member,
  )
}
