import type { z } from "zod"
import { planOf } from "@/lib/billing/plans"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import type { Access } from "@/lib/keys"
import { commitUsage, rateLimiter, SANDBOX_UNITS_A_DAY, type UsageReceipt } from "@/lib/usage"
import { admit } from "./admit"
import { corsHeaders, preflight } from "./cors"
import type { AnyOperation, Caller } from "./define-operation"
import { parseBody, parseInput } from "./parse"
import { problemOf, refusalOf } from "./problem"
import { type LimitState, rateHeaders } from "./rate-headers"
import type { ApiRequest, ApiResponse } from "./request"
import { createRouter, type Match } from "./router"

export interface ServeOptions {
  readonly registry: readonly AnyOperation[]
  /** Address that browsers use, for links in problems and for the portal's own explorer. */
  readonly publicUrl: string
  /** Told of each refusal that is our own fault. */
  readonly onFault?: (error: unknown, requestId: string) => void
}

export type Serve = (request: ApiRequest) => Promise<ApiResponse>

/** What is learned on the way through a call, so that a refusal half-way can say it too. */
interface Progress {
  readonly requestId: string
  readonly limits: LimitState[]
  access?: Access
  corsOrigin?: string
  charged: number
  receipt?: UsageReceipt
}

/**
 * Gives the operations of a registry their life: request id → route → key, origin, scope, address → rate limit →
 * body → run → commit of the usage → answer. Every answer, also a refusal, comes out as an {@link ApiResponse}.
 */
export function createServe({ registry, publicUrl, onFault }: ServeOptions): Serve {
  const router = createRouter(registry)

  return async function serve(request) {
    if (request.method === "OPTIONS") return preflight(router, request)
    const progress: Progress = { requestId: requestIdOf(request), limits: [], charged: 0 }
    try {
      const match = routeOf(request)
      const { operation } = match
      const ctx = await admitCaller(match, request, progress)
      const input = parseInput(operation, match, request, await bodyOf(operation, request))
      const output = await run(operation, input, ctx, request, progress)
      return success(operation, output, progress)
    } catch (error) {
      return refusal(error, progress)
    }
  }

  function routeOf(request: ApiRequest): Match {
    if (request.query.toString().includes("tarn_")) {
      throw new TarnwrightError(
        "key_in_url",
        "Send the key in the Authorization header. This one stands in the address, where logs keep it: rotate it.",
      )
    }
    const match = router.find(request.method, request.path)
    if (!match) throw new TarnwrightError("not_found", `There is no operation at ${request.path}.`)
    if ("allowed" in match) {
      throw new TarnwrightError("method_not_allowed", `Use ${match.allowed.join(" or ")} here.`)
    }
    return match
  }

  /** Who calls, if they may, within their rate. */
  async function admitCaller(
    match: Match,
    request: ApiRequest,
    progress: Progress,
  ): Promise<Ctx | undefined> {
    if (match.operation.access.kind === "public") return undefined
    const { access, corsOrigin } = await admit(match, request, publicUrl)
    progress.access = access
    progress.corsOrigin = corsOrigin
    await limitRate(access, progress)
    return {
      account_id: access.account_id,
      actor: { kind: "key", id: access.key_id },
      request_id: progress.requestId,
      ip: request.address,
      now: new Date(),
    }
  }

  async function run(
    operation: AnyOperation,
    input: unknown,
    ctx: Ctx | undefined,
    request: ApiRequest,
    progress: Progress,
  ): Promise<unknown> {
    const caller: Caller = {
      // A public operation declares that it needs no tenant.
      ctx: ctx as Ctx,
      origin: request.header("origin"),
      perform: (path, body) => performNested(path, body, ctx, request, progress),
    }
    const output = await operation.run({ input: input as z.output<z.ZodType>, caller })
    await charge(operation, progress)
    return output
  }

  /** One item of a batch: an operation performed, metered and refused as if it had come alone. */
  async function performNested(
    path: string,
    body: unknown,
    ctx: Ctx | undefined,
    request: ApiRequest,
    progress: Progress,
  ): Promise<{ status: number; body: unknown }> {
    try {
      const match = routeOf({ ...request, method: "POST", path })
      const { operation } = match
      if (
        operation.access.kind !== "key" ||
        operation.access.scope !== "calculate" ||
        operation.units === 0
      ) {
        throw new TarnwrightError("not_found", `${path} cannot be part of a batch: calculations can.`)
      }
      const input = parseInput(operation, match, request, body)
      return { status: operation.status, body: await run(operation, input, ctx, request, progress) }
    } catch (error) {
      const refused = refusalOf(error)
      if (refused.code === "unavailable" || refused.code === "internal") throw error
      const problem = problemOf(refused, publicUrl, progress.requestId)
      return { status: problem.status, body: problem }
    }
  }

  function refusal(error: unknown, progress: Progress): ApiResponse {
    const refused = refusalOf(error)
    if (refused.code === "internal" || refused.code === "unavailable")
      onFault?.(refused.cause, progress.requestId)
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
}

function requestIdOf(request: ApiRequest): string {
  const given = request.header("x-request-id")
  return given && /^[A-Za-z0-9._-]{1,64}$/.test(given) ? given : newId("request")
}

async function bodyOf(operation: AnyOperation, request: ApiRequest): Promise<unknown> {
  return operation.method === "POST" || operation.method === "PATCH" ? parseBody(request) : undefined
}

async function limitRate(access: Access, progress: Progress): Promise<void> {
  const points = access.mode === "sandbox" ? 5 : planOf(access.plan).calls_per_s
  const state = await rateLimiter().take(`${access.account_id}:${access.mode}`, { points, window_s: 1 })
  progress.limits.push({ name: "burst", quota: points, window_s: 1, ...state })
  if (!state.allowed) {
    throw new TarnwrightError(
      "rate_limited",
      `You may call ${points} times a second. Wait a second and try again.`,
      {
        retryAfterS: Math.max(1, state.reset_s),
      },
    )
  }
}

/** Makes the usage durable; until then nothing may be answered. */
async function charge(operation: AnyOperation, progress: Progress): Promise<void> {
  const { access } = progress
  if (!access || operation.units === 0) return
  const receipt = await commitUsage({
    account_id: access.account_id,
    key_id: access.key_id,
    mode: access.mode,
    operation: operation.id,
    units: operation.units,
    request_id: progress.requestId,
  })
  progress.receipt = receipt
  if (!receipt.admitted) throw capReached(access, receipt)
  progress.charged += operation.units
}

function capReached(access: Access, { cap, resets_at }: UsageReceipt): TarnwrightError {
  const until = resets_at.toISOString()
  if (access.mode === "sandbox") {
    return new TarnwrightError(
      "rate_limited",
      `The sandbox gives ${SANDBOX_UNITS_A_DAY} units a day, until ${until}.`,
      {
        retryAfterS: Math.max(1, Math.ceil((resets_at.getTime() - Date.now()) / 1000)),
      },
    )
  }
  return new TarnwrightError(
    "quota_reached",
    `This call does not fit into the ${cap} units of the period that ends at ${until}. The account's owner can ` +
      "choose a larger plan, or allow spending beyond it, on the billing page of the portal.",
  )
}

function success(operation: AnyOperation, output: unknown, progress: Progress): ApiResponse {
  return {
    status: operation.status,
    headers: {
      ...commonHeaders(progress),
      "content-type": "application/json",
      "cache-control": "no-store",
      ...(progress.access && { "tarnwright-units": String(progress.charged) }),
      ...(operation.deprecation && {
        deprecation: `@${Math.floor(operation.deprecation.since.getTime() / 1000)}`,
        sunset: operation.deprecation.sunset.toUTCString(),
        link: `<${operation.deprecation.page}>; rel="deprecation"; type="text/html"`,
      }),
    },
    body: operation.status === 204 ? null : JSON.stringify(output),
  }
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
    ...corsHeaders(progress.corsOrigin),
  }
}
