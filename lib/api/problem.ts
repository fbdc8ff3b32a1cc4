import { type ErrorCode, type FieldError, TarnwrightError } from "@/lib/errors"
import { OutOfDomain } from "@/lib/units/out-of-domain"

/** The HTTP form of each refusal: one row a code. Its page is `/docs/errors/{code}`. */
export const problems: Record<ErrorCode, { status: number; title: string }> = {
  malformed_json: { status: 400, title: "The body is not JSON" },
  key_in_url: { status: 400, title: "A key stands in the address" },
  session_missing: { status: 401, title: "Nobody is signed in" },
  second_factor_required: { status: 401, title: "A code of the second factor is missing" },
  key_missing: { status: 401, title: "No key was sent" },
  key_unknown: { status: 401, title: "The key is not known" },
  key_revoked: { status: 401, title: "The key was revoked" },
  key_expired: { status: 401, title: "The key has expired" },
  quota_reached: { status: 402, title: "The units of this period are used up" },
  server_key_in_browser: { status: 403, title: "A server key was used from a browser" },
  origin_not_allowed: { status: 403, title: "The origin is not on the list" },
  address_not_allowed: { status: 403, title: "The network address is not on the list" },
  scope_missing: { status: 403, title: "The key lacks the scope" },
  account_suspended: { status: 403, title: "The account is suspended" },
  step_up_required: { status: 403, title: "Confirm first that it is you" },
  forbidden: { status: 403, title: "Your role does not allow this" },
  plan_limit_reached: { status: 403, title: "The plan does not include more of these" },
  not_found: { status: 404, title: "There is nothing here" },
  method_not_allowed: { status: 405, title: "The method is not offered here" },
  gone: { status: 410, title: "This operation was retired" },
  conflict: { status: 409, title: "The change conflicts with what is stored" },
  idempotency_conflict: { status: 409, title: "The idempotency key was used for another request" },
  body_too_large: { status: 413, title: "The body is too large" },
  media_type_unsupported: { status: 415, title: "The media type is not JSON" },
  validation_failed: { status: 422, title: "The input is not valid" },
  out_of_domain: { status: 422, title: "The input is physically impossible or outside the method" },
  rate_limited: { status: 429, title: "Too many calls" },
  internal: { status: 500, title: "Something failed on our side" },
  unavailable: { status: 503, title: "The service is resting for a moment" },
}

/** A problem document after RFC 9457, with our stable `code`. */
export interface Problem {
  type: string
  title: string
  status: number
  detail: string
  instance: string
  code: ErrorCode
  errors?: readonly FieldError[]
}

/** The refusal that an error stands for; what is not ours is `internal` and says nothing of the cause. */
export function refusalOf(error: unknown): TarnwrightError {
  if (error instanceof TarnwrightError) return error
  if (error instanceof OutOfDomain) {
    const pointer = error.field === "" ? "" : `/${error.field.replaceAll(".", "/")}`
    return new TarnwrightError("out_of_domain", error.detail, { errors: [{ pointer, detail: error.detail }] })
  }
  if (error instanceof Error && "code" in error && error.code === "unavailable") {
    return new TarnwrightError(
      "unavailable",
      "We could not reach our database. Try again in a few seconds.",
      {
        retryAfterS: 2,
        cause: error,
      },
    )
  }
  return new TarnwrightError(
    "internal",
    "An error that we did not foresee. It was recorded under this request's id.",
    {
      cause: error,
    },
  )
}

/** The problem document of a refusal. `instance` is the id of the request that was refused. */
export function problemOf(refusal: TarnwrightError, publicUrl: string, requestId: string): Problem {
  const { status, title } = problems[refusal.code]
  return {
    type: `${publicUrl}${problemPath(refusal.code)}`,
    title,
    status,
    detail: refusal.detail,
    instance: requestId,
    code: refusal.code,
    ...(refusal.errors.length > 0 && { errors: refusal.errors }),
  }
}

/** Page that explains a code. */
export function problemPath(code: ErrorCode): string {
  return `/docs/errors/${code}`
}
