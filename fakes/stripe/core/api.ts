import type { IncomingMessage, ServerResponse } from "node:http"
import { routes } from "../resources"
import { readBody, sendJson } from "./answer"
import { ApiError, invalid } from "./errors"
import { present } from "./expand"
import { API_VERSION, type Fake } from "./fake"
import { takeFault } from "./faults"
import { decodeForm } from "./form"
import { fingerprint, keyInUse, recall, remember } from "./idempotency"
import { newId } from "./ids"
import { match } from "./route"

interface Outcome {
  status: number
  body: string
  shouldRetry?: boolean | undefined
  /** Whether an idempotency key replays it: what never began to run is not kept. */
  keep: boolean
}

interface Request {
  id: string
  method: string
  url: URL
  text: string
  key: string | null
}

const running = new WeakMap<Fake, Set<string>>()

/** Answers one call to the API, spoiled by whatever fault is set for it. */
export async function serveApi(
  fake: Fake,
  incoming: IncomingMessage,
  response: ServerResponse,
): Promise<void> {
  const id = newId("req")
  const url = new URL(incoming.url ?? "/", fake.base)
  const method = incoming.method ?? "GET"
  const about = { method, path: url.pathname }
  if (takeFault(fake.state, ["drop_connection"], about)) {
    incoming.socket.destroy()
    return
  }
  const key = headerOf(incoming, "idempotency-key")
  const request: Request = { id, method, url, text: "", key }
  const headers: Record<string, string> = { "request-id": id, "stripe-version": API_VERSION }
  if (key) headers["idempotency-key"] = key
  try {
    request.text = await readBody(incoming)
    authenticate(fake, incoming)
    const done = await keyed(fake, request)
    if (done.replayOf)
      Object.assign(headers, { "idempotent-replayed": "true", "original-request": done.replayOf })
    finish(fake, response, request, done.outcome, headers)
  } catch (error) {
    if (!(error instanceof ApiError)) throw error
    finish(fake, response, request, refused(error), headers)
  }
}

function finish(
  fake: Fake,
  response: ServerResponse,
  request: Request,
  outcome: Outcome,
  headers: Record<string, string>,
): void {
  if (outcome.shouldRetry !== undefined) headers["stripe-should-retry"] = String(outcome.shouldRetry)
  if (takeFault(fake.state, ["truncate"], { method: request.method, path: request.url.pathname })) {
    const half = outcome.body.slice(0, Math.floor(outcome.body.length / 2))
    response.writeHead(outcome.status, {
      "content-type": "application/json",
      "content-length": Buffer.byteLength(outcome.body),
      ...headers,
    })
    response.write(half, () => response.destroy())
    return
  }
  sendJson(response, outcome.status, outcome.body, headers)
}

/** Runs the call unless its idempotency key has an answer already. */
async function keyed(fake: Fake, request: Request): Promise<{ outcome: Outcome; replayOf?: string }> {
  const { key } = request
  if (!key || request.method === "GET") return { outcome: await execute(fake, request) }
  const print = fingerprint(request.method, request.url.pathname, request.text)
  const stored = recall(fake.state, key, print)
  if (stored) {
    const { status, body, requestId, shouldRetry } = stored
    return {
      outcome: { status, body, shouldRetry: shouldRetry ?? undefined, keep: true },
      replayOf: requestId,
    }
  }
  const busy = running.get(fake) ?? new Set<string>()
  running.set(fake, busy)
  if (busy.has(key)) throw keyInUse(key)
  busy.add(key)
  try {
    const outcome = await execute(fake, request)
    if (outcome.keep) {
      const { status, body, shouldRetry = null } = outcome
      remember(fake.state, key, { fingerprint: print, status, body, requestId: request.id, shouldRetry })
      fake.changed()
    }
    return { outcome }
  } finally {
    busy.delete(key)
  }
}

async function execute(fake: Fake, request: Request): Promise<Outcome> {
  const about = { method: request.method, path: request.url.pathname }
  const slow = takeFault(fake.state, ["slow"], about)
  if (slow) await new Promise((resolve) => setTimeout(resolve, slow.seconds * 1000).unref())
  const before = takeFault(fake.state, ["error_before"], about)
  if (before) return { ...refused(broken(before.status, before.should_retry)), keep: false }
  const found = match(routes, request.method, request.url.pathname)
  if (!found) throw unknownRoute(request)
  const { expand, values } = parametersOf(request)
  fake.cause = { id: request.id, idempotency_key: request.key }
  let outcome: Outcome
  try {
    const answer = found.route.run(fake, values, found.path)
    outcome = { status: 200, body: JSON.stringify(present(fake, answer, expand), null, 2), keep: true }
  } catch (error) {
    if (!(error instanceof ApiError)) throw error
    // A declined card is an outcome of the call; a malformed parameter means that it never ran.
    outcome = { ...refused(error), keep: error.status === 402 }
  } finally {
    fake.cause = { id: null, idempotency_key: null }
  }
  const after = takeFault(fake.state, ["error_after"], about)
  return after ? { ...refused(broken(after.status, after.should_retry)), keep: true } : outcome
}

function parametersOf(request: Request): { expand: string[]; values: Record<string, unknown> } {
  const query = decodeForm(request.url.search.slice(1))
  const body = request.method === "POST" ? bodyOf(request) : {}
  const { expand = [], ...values } = { ...query, ...body } as Record<string, unknown>
  if (!Array.isArray(expand)) throw invalid("Invalid array", "expand")
  return { expand: expand.map(String), values }
}

/** Version 2 of the API takes JSON, version 1 bracketed forms. */
function bodyOf({ url, text }: Request): Record<string, unknown> {
  if (!url.pathname.startsWith("/v2/")) return decodeForm(text)
  try {
    return text === "" ? {} : (JSON.parse(text) as Record<string, unknown>)
  } catch {
    throw invalid("The body is not valid JSON.")
  }
}

function authenticate(fake: Fake, incoming: IncomingMessage): void {
  const [scheme, token] = (headerOf(incoming, "authorization") ?? "").split(" ")
  if (scheme !== "Bearer" || !token) {
    throw new ApiError(401, { type: "invalid_request_error", message: "You did not provide an API key." })
  }
  if (token !== fake.options.secretKey) {
    const shown = `${token.slice(0, 8)}…${token.slice(-4)}`
    throw new ApiError(401, { type: "invalid_request_error", message: `Invalid API Key provided: ${shown}` })
  }
  const version = headerOf(incoming, "stripe-version")
  if (version !== API_VERSION) {
    throw invalid(
      `This stand-in speaks version ${API_VERSION} of the API only, and was sent ${version ?? "none"}.`,
    )
  }
}

function refused(error: ApiError): Outcome {
  return {
    status: error.status,
    body: JSON.stringify({ error: error.body }),
    shouldRetry: error.shouldRetry,
    keep: false,
  }
}

function broken(status: number, shouldRetry: boolean | undefined): ApiError {
  const type = status >= 500 ? "api_error" : "invalid_request_error"
  const code = status === 429 ? { code: "rate_limit" } : status === 409 ? { code: "lock_timeout" } : {}
  return new ApiError(status, { type, message: `A fault was asked for: ${status}.`, ...code }, shouldRetry)
}

function unknownRoute({ method, url }: Request): ApiError {
  const message = `Unrecognized request URL (${method}: ${url.pathname}).`
  return new ApiError(404, { type: "invalid_request_error", message })
}

function headerOf(incoming: IncomingMessage, name: string): string | null {
  const value = incoming.headers[name]
  return typeof value === "string" && value !== "" ? value : null
}
