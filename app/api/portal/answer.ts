import type { z } from "zod"
import { problemOf, refusalOf } from "@/lib/api/problem"
import { env } from "@/lib/env"
import { TarnwrightError } from "@/lib/errors"

const bodyLimit_bytes = 256 * 1024

/** The answer of a route for pages: JSON, or a file as it is. Never cached: it belongs to the one who is signed in. */
export function answer(value: unknown, requestId: string, status = 200): Response {
  if (value instanceof Response) return value
  return Response.json(value ?? null, { status, headers: headersOf(requestId) })
}

/** The problem document of an error; a fault of ours is logged under the request's id. */
export function refuse(error: unknown, requestId: string): Response {
  const refusal = refusalOf(error)
  if (refusal.code === "internal" || refusal.code === "unavailable") {
    console.error(`request ${requestId} failed:`, refusal.cause)
  }
  const problem = problemOf(refusal, env().PUBLIC_URL, requestId)
  const headers = headersOf(requestId)
  headers.set("content-type", "application/problem+json")
  if (refusal.retryAfterS !== undefined) headers.set("retry-after", String(refusal.retryAfterS))
  return new Response(JSON.stringify(problem), { status: problem.status, headers })
}

/**
 * @throws TarnwrightError `forbidden` when a page of another site sent this. Only our own pages may change anything,
 * whatever cookie comes along. @source PLATFORM 5.4
 */
export function refuseOtherSites(request: Request): void {
  if (request.method === "GET") return
  const site = request.headers.get("sec-fetch-site")
  const origin = request.headers.get("origin")
  const own = origin === new URL(env().PUBLIC_URL).origin && (site === null || site === "same-origin")
  if (!own) throw new TarnwrightError("forbidden", "Only the portal's own pages may ask for this.")
}

/**
 * What a request asks, from its path, its query (of a GET) or its JSON body.
 *
 * @throws TarnwrightError `malformed_json`, `body_too_large`, or `validation_failed` with every field that is wrong.
 */
export async function inputOf<Schema extends z.ZodType>(
  schema: Schema,
  request: Request,
  pathParams: Record<string, string>,
  limit_bytes = bodyLimit_bytes,
): Promise<z.output<Schema>> {
  const given =
    request.method === "GET"
      ? Object.fromEntries(new URL(request.url).searchParams)
      : await bodyOf(request, limit_bytes)
  const parsed = schema.safeParse(isRecord(given) ? { ...given, ...pathParams } : given)
  if (parsed.success) return parsed.data
  const errors = parsed.error.issues.map((issue) => ({
    pointer: issue.path.length > 0 ? `/${issue.path.join("/")}` : "",
    detail: issue.message,
  }))
  throw new TarnwrightError("validation_failed", "Some of what was sent is not valid.", { errors })
}

async function bodyOf(request: Request, limit_bytes: number): Promise<unknown> {
  const tooLarge = new TarnwrightError("body_too_large", "This is more than a form of ours can hold.")
  if (Number(request.headers.get("content-length") ?? 0) > limit_bytes) throw tooLarge
  const text = await request.text()
  if (text.length > limit_bytes) throw tooLarge
  if (text === "") return {}
  try {
    return JSON.parse(text)
  } catch {
    throw new TarnwrightError("malformed_json", "The body is not JSON.")
  }
}

function headersOf(requestId: string): Headers {
  return new Headers({ "cache-control": "no-store", "x-request-id": requestId })
}

function isRecord(value: unknown): value is Record<string, unknown> {
  return typeof value === "object" && value !== null && !Array.isArray(value)
}
