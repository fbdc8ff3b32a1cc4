import type { z } from "zod"
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
 * The body of a call: JSON, or the text of a CSV file where the operation takes one.
 *
 * @throws TarnwrightError `media_type_unsupported`, `body_too_large`, `malformed_json`.
 */
export async function parseBody({ csv }: AnyOperation, request: ApiRequest): Promise<unknown> {
  const mediaType = request.header("content-type")?.split(";")[0]?.trim().toLowerCase()
  const wanted = csv ? "text/csv" : "application/json"
  if (mediaType !== undefined && mediaType !== wanted) throw unsupported(wanted)
  const bytes = await request.readBody(csv?.limit_bytes ?? BODY_LIMIT_BYTES)
  if (bytes.length === 0) {
    throw new TarnwrightError(
      "malformed_json",
      `The body is empty. Send ${csv ? "a CSV file" : "a JSON object"}.`,
    )
  }
  if (mediaType === undefined) throw unsupported(wanted)
  const text = decoded(bytes)
  return csv ? { ...Object.fromEntries(request.query), csv: text } : parsed(text)
}

function unsupported(wanted: string): TarnwrightError {
  return new TarnwrightError("media_type_unsupported", `Send the body with Content-Type: ${wanted}.`)
}

function decoded(bytes: Uint8Array): string {
  try {
    return utf8.decode(bytes)
  } catch {
    throw new TarnwrightError("malformed_json", "The body is not UTF-8.")
  }
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch (error) {
    throw new TarnwrightError(
      "malformed_json",
      `The body cannot be read as JSON: ${(error as SyntaxError).message}.`,
    )
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
  const given = candidate(match, request, body)
  const outcome = operation.request.safeParse(given)
  if (outcome.success) return outcome.data
  // Asked a second time for the words alone: zod is several times slower when it keeps what it was given.
  const refused = operation.request.safeParse(given, { reportInput: true }) as z.ZodSafeParseError<unknown>
  const errors = refused.error.issues.flatMap(fieldErrors).slice(0, mostErrors)
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
