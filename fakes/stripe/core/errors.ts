/** Error body of the v1 API. @source Stripe API reference, "Errors" */
export interface ErrorBody {
  type: "api_error" | "card_error" | "idempotency_error" | "invalid_request_error"
  message: string
  code?: string
  decline_code?: string
  param?: string
  payment_method?: string
}

/** A refusal that a handler throws and the server turns into an answer. */
export class ApiError extends Error {
  constructor(
    readonly status: number,
    readonly body: ErrorBody,
    /** Overrides the retry rule of the SDK through the `stripe-should-retry` header. */
    readonly shouldRetry?: boolean,
  ) {
    super(body.message)
  }
}

export function invalid(message: string, param?: string, code?: string): ApiError {
  return new ApiError(400, {
    type: "invalid_request_error",
    message,
    ...(param && { param }),
    ...(code && { code }),
  })
}

export function missing(kind: string, id: string, param = "id"): ApiError {
  const message = `No such ${kind.replaceAll("_", " ")}: '${id}'`
  return new ApiError(404, { type: "invalid_request_error", code: "resource_missing", message, param })
}

export function cardDeclined(declineCode: string, message: string, code = "card_declined"): ApiError {
  return new ApiError(402, { type: "card_error", code, decline_code: declineCode, message })
}
