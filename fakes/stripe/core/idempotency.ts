import { createHash } from "node:crypto"
import { ApiError } from "./errors"
import type { State } from "./state"

const KEPT_S = 24 * 3600

/** A finished call, replayed to a later one with the same key. */
export interface StoredAnswer {
  fingerprint: string
  status: number
  body: string
  requestId: string
  at_s: number
  shouldRetry: boolean | null
}

export function fingerprint(method: string, path: string, body: string): string {
  return createHash("sha256").update(`${method}\n${path}\n${body}`).digest("hex")
}

/**
 * The stored answer to a key. @source Stripe API reference, "Idempotent requests"
 *
 * @throws ApiError 400 `idempotency_error` when the key came with another request before
 */
export function recall(state: State, key: string, print: string): StoredAnswer | undefined {
  const now = Date.now() / 1000
  const found = state.answers[key]
  if (!found || now - found.at_s > KEPT_S) return undefined
  if (found.fingerprint !== print) {
    throw new ApiError(400, {
      type: "idempotency_error",
      message: `Keys for idempotent requests can only be used with the same parameters they were first used with. Try using a key other than '${key}' if you meant to execute a different request.`,
    })
  }
  return found
}

export function remember(state: State, key: string, answer: Omit<StoredAnswer, "at_s">): void {
  const now = Date.now() / 1000
  for (const [other, stored] of Object.entries(state.answers)) {
    if (now - stored.at_s > KEPT_S) delete state.answers[other]
  }
  state.answers[key] = { ...answer, at_s: now }
}

export function keyInUse(key: string): ApiError {
  return new ApiError(409, {
    type: "idempotency_error",
    code: "idempotency_key_in_use",
    message: `There is currently another in-progress request using this idempotency key (${key}).`,
  })
}
