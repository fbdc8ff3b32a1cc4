import { createHash } from "node:crypto"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import type { TarnwrightError } from "@/lib/errors"
import type { KeptAnswer } from "@/lib/usage"
import { corsHeaders } from "./cors"
import type { AnyOperation } from "./define-operation"
import { jsonOf } from "./json-bytes"
import { problemOf } from "./problem"
import type { Progress } from "./progress"
import { rateHeaders } from "./rate-headers"
import { API_PREFIX, type ApiRequest, type ApiResponse } from "./request"

/** The answer to a call that succeeded. What everybody may read carries an ETag and can be answered by 304. */
export function success(
  operation: AnyOperation,
  output: unknown,
  request: ApiRequest,
  progress: Progress,
): ApiResponse {
  const body = bodyOf(operation, output)
  const headers = {
    ...commonHeaders(progress),
    "content-type": operation.pdf ? "application/pdf" : "application/json",
    ...(progress.access && { "tarnwright-units": String(progress.charged) }),
    ...linkHeaders(progress, output, request),
  }
  if (operation.access.kind !== "public" || body === null) {
    return { status: operation.status, headers: { ...headers, "cache-control": "no-store" }, body }
  }
  const etag = `"${createHash("sha256").update(body).digest("base64url")}"`
  const unchanged = request.header("if-none-match") === etag
  return {
    status: unchanged ? 304 : operation.status,
    headers: { ...headers, etag, "cache-control": "no-cache" },
    body: unchanged ? null : body,
  }
}

function bodyOf({ status, pdf }: AnyOperation, output: unknown): string | Uint8Array | null {
  if (status === 204) return null
  return pdf ? (output as Uint8Array) : jsonOf(output)
}

/** The answer that an earlier call with the same idempotency key got. */
export function replay(kept: KeptAnswer, progress: Progress): ApiResponse {
  return {
    status: kept.status,
    headers: {
      ...commonHeaders(progress),
      "content-type": "application/json",
      "cache-control": "no-store",
      "idempotency-replayed": "true",
      "tarnwright-units": "0",
    },
    body: kept.body === "" ? null : kept.body,
  }
}

/** The answer to a call that was refused: a problem document. */
export function refusal(refused: TarnwrightError, publicUrl: string, progress: Progress): ApiResponse {
  const problem = problemOf(refused, publicUrl, progress.requestId)
  return {
    status: problem.status,
    headers: {
      ...commonHeaders(progress),
      "content-type": "application/problem+json",
      "cache-control": "no-store",
      ...(problem.status === 401 && { "www-authenticate": 'Bearer error="invalid_token"' }),
      ...(refused.retryAfterS !== undefined && { "retry-after": String(refused.retryAfterS) }),
    },
    body: JSON.stringify(problem),
  }
}

/** Links to the next page of a list, beside the one to a deprecation. @source RFC 8288 */
function linkHeaders(progress: Progress, output: unknown, request: ApiRequest): Record<string, string> {
  if (!isPage(output)) return {}
  const next = `<${nextPage(request, output.next_cursor)}>; rel="next"`
  return { link: [deprecationLink(progress), next].filter(Boolean).join(", ") }
}

function isPage(output: unknown): output is { next_cursor: string } {
  return (
    typeof output === "object" && output !== null && "next_cursor" in output && output.next_cursor !== null
  )
}

function nextPage({ path, query }: ApiRequest, cursor: string): string {
  const next = new URLSearchParams(query)
  next.set("cursor", cursor)
  return `${API_PREFIX}${path}?${next}`
}

/** @source RFC 9745 section 2.1 (a structured-field date) and section 3; RFC 8594 section 3 (an HTTP date). */
function deprecationHeaders(progress: Progress): Record<string, string> {
  const { deprecation } = progress
  if (!deprecation) return {}
  return {
    deprecation: `@${Math.floor(deprecation.since.getTime() / 1000)}`,
    sunset: deprecation.sunset.toUTCString(),
    link: deprecationLink(progress) ?? "",
  }
}

function deprecationLink({ deprecation }: Progress): string | undefined {
  return deprecation && `<${deprecation.page}>; rel="deprecation"; type="text/html"`
}

function commonHeaders(progress: Progress): Record<string, string> {
  const { receipt, access } = progress
  const limits = [...progress.limits]
  if (receipt && access) {
    const reset_s = Math.max(0, Math.ceil((receipt.resets_at.getTime() - Date.now()) / 1000))
    const sandbox = access.mode === "sandbox"
    limits.push({
      name: sandbox ? "day" : "period",
      quota: receipt.cap,
      window_s: sandbox ? 86_400 : 2_592_000,
      remaining: receipt.cap - receipt.used,
      reset_s,
    })
  }
  return {
    "x-request-id": progress.requestId,
    "x-content-type-options": "nosniff",
    "tarnwright-method": ENGINE_VERSION,
    ...(receipt && { "tarnwright-units-remaining": String(Math.max(0, receipt.cap - receipt.used)) }),
    ...rateHeaders(limits),
    ...deprecationHeaders(progress),
    ...corsHeaders(progress.corsOrigin),
  }
}
