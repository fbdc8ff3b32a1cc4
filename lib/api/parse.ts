import { TarnwrightError } from "@/lib/errors"
import type { AnyOperation } from "./define-operation"
import { fieldErrors } from "./field-errors"
import type { ApiRequest } from "./request"
import type { Match } from "./router"

/** Largest body of a JSON call. */
export const BODY_LIMIT_BYTES = 256 * 1024

const mostErrors = 50
const utf8 = new TextDecoder("utf-8", { fatal: true })

/**
 * The JSON body of a call; an empty body is an empty object where the operation takes one.
 *
 * @throws TarnwrightError `media_type_unsupported`, `body_too_large`, `malformed_json`.
 */
export async function parseBody(request: ApiRequest): Promise<unknown> {
  const mediaType = request.header("content-type")?.split(";")[0]?.trim().toLowerCase()
  if (mediaType !== undefined && mediaType !== "application/json") {
    throw new TarnwrightError("media_type_unsupported", "Send JSON, with Content-Type: application/json.")
  }
  const bytes = await request.readBody(BODY_LIMIT_BYTES)
  if (bytes.length > 0 && mediaType === undefined) {
    throw new TarnwrightError(
      "media_type_unsupported",
      "Say what the body is, with Content-Type: application/json.",
    )
  }
  if (bytes.length === 0) {
    throw new TarnwrightError("malformed_json", "The body is empty. Send a JSON object.")
  }
  try {
    return JSON.parse(utf8.decode(bytes))
  } catch (error) {
    const reason = error instanceof SyntaxError ? error.message : "it is not UTF-8"
    throw new TarnwrightError("malformed_json", `The body cannot be read as JSON: ${reason}.`)
  }
}

/**
 * The input of an operation: its body or query with the path's parameters, checked, with defaults filled in.
 *
 * @throws TarnwrightError `validation_failed` with a pointer to each thing that is wrong, at most 50.
 */
export function parseInput(
  operation: AnyOperation,
  match: Match,
  request: ApiRequest,
  body: unknown,
): unknown {
  const outcome = operation.request.safeParse(candidate(match, request, body), { reportInput: true })
  if (outcome.success) return outcome.data
  const errors = outcome.error.issues.flatMap(fieldErrors).slice(0, mostErrors)
  const [first] = errors
  throw new TarnwrightError(
    "validation_failed",
    errors.length === 1 && first
      ? `${first.pointer || "The body"}: ${first.detail}`
      : `${errors.length} things are wrong.`,
    { errors },
  )
}

function candidate(match: Match, request: ApiRequest, body: unknown): unknown {
  const { method } = match.operation
  if (method === "GET" || method === "DELETE")
    return { ...Object.fromEntries(request.query), ...match.params }
  if (typeof body !== "object" || body === null || Array.isArray(body)) return body
  return Object.keys(match.params).length === 0 ? body : { ...body, ...match.params }
}
