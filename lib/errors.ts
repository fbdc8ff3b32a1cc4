/** Every way in which a verb can refuse, by its stable code. `lib/api/problem.ts` gives each its HTTP form. */
export type ErrorCode =
  | "malformed_json"
  | "session_missing"
  | "second_factor_required"
  | "step_up_required"
  | "key_missing"
  | "key_unknown"
  | "key_revoked"
  | "key_expired"
  | "key_in_url"
  | "server_key_in_browser"
  | "origin_not_allowed"
  | "address_not_allowed"
  | "scope_missing"
  | "account_suspended"
  | "forbidden"
  | "plan_limit_reached"
  | "quota_reached"
  | "not_found"
  | "method_not_allowed"
  | "gone"
  | "conflict"
  | "idempotency_conflict"
  | "body_too_large"
  | "media_type_unsupported"
  | "validation_failed"
  | "out_of_domain"
  | "rate_limited"
  | "unavailable"
  | "internal"

/** One thing wrong with one part of the input. `pointer` is a JSON Pointer (RFC 6901), "" for the whole body. */
export interface FieldError {
  readonly pointer: string
  readonly detail: string
}

/** A refusal. `detail` says in words what is wrong and how to mend it; it never carries a secret. */
export class TarnwrightError extends Error {
  readonly errors: readonly FieldError[]
  readonly retryAfterS: number | undefined

  constructor(
    readonly code: ErrorCode,
    readonly detail: string,
    options: { errors?: readonly FieldError[]; retryAfterS?: number; cause?: unknown } = {},
  ) {
    super(`${code}: ${detail}`, { cause: options.cause })
    this.name = "TarnwrightError"
    this.errors = options.errors ?? []
    this.retryAfterS = options.retryAfterS
  }
}
