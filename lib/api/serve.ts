import type { z } from "zod"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { logRefusal } from "@/lib/usage"
import { admit } from "./admit"
import { preflight } from "./cors"
import type { AnyOperation, Caller, NestedAnswer, NestedCall } from "./define-operation"
import { charge, chargeInTurn, limitAddress, limitRate } from "./limits"
import { once } from "./once"
import { parseBody, parseInput } from "./parse"
import { problemOf, problems, refusalOf } from "./problem"
import type { Progress } from "./progress"
import type { ApiRequest, ApiResponse } from "./request"
import { refusal, success } from "./respond"
import { createRouter, type Match } from "./router"

export interface ServeOptions {
  readonly registry: readonly AnyOperation[]
  /** Address that browsers use, for links in problems and for the portal's own explorer. */
  readonly publicUrl: string
  /** Told of each refusal that is our own fault. */
  readonly onFault?: (error: unknown, requestId: string) => void
}

export type Serve = (request: ApiRequest) => Promise<ApiResponse>

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
      progress.deprecation = operation.deprecation
      refuseRetired(operation)
      const ctx = await admitCaller(match, request, progress)
      const body = await bodyOf(operation, request)
      const input = parseInput(operation, match, request, body)
      return await once(operation, request, body, ctx, progress, async () =>
        success(operation, await run(operation, input, ctx, request, progress), request, progress),
      )
    } catch (error) {
      const refused = reported(error, progress)
      logRefused(refused, request, progress)
      return refusal(refused, publicUrl, progress)
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
    const access = await admit(match, request, publicUrl, progress)
    await limitAddress(match.operation, request.address)
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
    let charging: Promise<void> | undefined
    const caller: Caller = {
      // A public operation declares that it needs no tenant.
      ctx: ctx as Ctx,
      origin: request.header("origin"),
      charge: () => {
        charging ??= charge(operation, progress)
        return charging
      },
      perform: (calls) => performNested(calls, ctx as Ctx, request, progress),
    }
    const output = await operation.run({ input: input as z.output<z.ZodType>, caller })
    await caller.charge()
    return output
  }

  /** The items of a batch, each performed, metered and refused as if it had come alone. */
  async function performNested(
    calls: readonly NestedCall[],
    ctx: Ctx,
    request: ApiRequest,
    progress: Progress,
  ): Promise<NestedAnswer[]> {
    const outcomes = await Promise.all(calls.map((call) => calculate(call, ctx, request)))
    const charged = await chargeInTurn(
      outcomes.flatMap((outcome) => ("operation" in outcome ? [outcome.operation] : [])),
      progress,
    )
    let turn = 0
    return outcomes.map((outcome) => {
      const refused = "error" in outcome ? reported(outcome.error, progress) : charged[turn++]
      if (!refused && "operation" in outcome) {
        return { status: outcome.operation.status, body: outcome.output }
      }
      const problem = problemOf(refused as TarnwrightError, publicUrl, progress.requestId)
      return { status: problem.status, body: problem }
    })
  }

  /** One calculation of a batch, not yet metered. */
  async function calculate({ path, body }: NestedCall, ctx: Ctx, request: ApiRequest): Promise<Calculated> {
    try {
      const match = nestedRoute(path)
      const { operation } = match
      const caller: Caller = { ctx, origin: request.header("origin"), charge: nothing, perform: noBatch }
      const input = parseInput(operation, match, request, body) as z.output<z.ZodType>
      return { operation, output: await operation.run({ input, caller }) }
    } catch (error) {
      return { error }
    }
  }

  function nestedRoute(path: string): Match {
    const match = router.find("POST", path)
    if (!match) throw new TarnwrightError("not_found", `There is no operation at ${path}.`)
    const nested = "operation" in match ? match.operation : undefined
    if (nested?.access.kind !== "key" || nested.access.scope !== "calculate" || nested.units === 0) {
      throw new TarnwrightError("not_found", `${path} cannot be part of a batch: calculations can.`)
    }
    return match as Match
  }

  /** The refusal that an error stands for; where the fault is ours, `onFault` is told its cause. */
  function reported(error: unknown, { requestId }: Progress): TarnwrightError {
    const refused = refusalOf(error)
    if (refused.code === "internal" || refused.code === "unavailable") onFault?.(refused.cause, requestId)
    return refused
  }
}

/** A calculation of a batch before it is metered. */
type Calculated = { readonly operation: AnyOperation; readonly output: unknown } | { readonly error: unknown }

// A calculation stores nothing, so it charges nothing by itself; and no batch is part of another.
const nothing = () => Promise.resolve()
const noBatch = () => Promise.reject(new TarnwrightError("not_found", "A batch cannot be part of a batch."))

/** @source RFC 8594: after its Sunset date an operation is gone. */
function refuseRetired({ path, deprecation }: AnyOperation): void {
  if (deprecation && deprecation.sunset.getTime() <= Date.now()) {
    throw new TarnwrightError(
      "gone",
      `${path} was retired. ${deprecation.page} says what to use in its place.`,
    )
  }
}

/** Puts a refusal into the request log of the account whose key it was. */
function logRefused(
  { code, detail, errors }: TarnwrightError,
  request: ApiRequest,
  progress: Progress,
): void {
  const { access, requestId } = progress
  if (!access) return
  const { account_id, key_id, mode } = access
  const { method, path } = request
  const { status } = problems[code]
  logRefusal({ account_id, id: requestId, key_id, mode, method, path, status, code, detail, errors })
}

function requestIdOf(request: ApiRequest): string {
  const given = request.header("x-request-id")
  return given && /^[A-Za-z0-9._-]{1,64}$/.test(given) ? given : newId("request")
}

async function bodyOf(operation: AnyOperation, request: ApiRequest): Promise<unknown> {
  return operation.method === "POST" || operation.method === "PATCH"
    ? parseBody(operation, request)
    : undefined
}
