import { cookies } from "next/headers"
import type { z } from "zod"
import { sessionCookieName } from "@/app/session-cookie"
import { visitorOf } from "@/app/visitor"
import {
  authorize,
  findMembership,
  type Person,
  type ReadSession,
  type Right,
  readSession,
  requireFresh,
  type Visitor,
} from "@/lib/accounts"
import type { Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { answer, inputOf, refuse, refuseOtherSites } from "./answer"

type Params = Record<string, string>
type Handler = (request: Request, context: { params: Promise<Params> }) => Promise<Response>

interface Endpoint<Schema extends z.ZodType, Asked> {
  /** Path, query and body, in one strict object; the account of the path is not in it. */
  readonly input: Schema
  /** Whether it takes a password or a code that was shown in the last ten minutes. */
  readonly fresh?: boolean | ((input: z.output<Schema>) => boolean)
  /** Most that its body may hold; absent, what a form can. */
  readonly limit_bytes?: number
  /** What it gives back is the JSON of the answer, or, for a file, the answer itself. */
  run(asked: Asked & { readonly input: z.output<Schema> }): Promise<unknown>
}

/** A route of an account: who is signed in, belongs to it and has the right may ask. */
export function accountEndpoint<Schema extends z.ZodType>(
  endpoint: Endpoint<Schema, { readonly ctx: Ctx; readonly person: Person }> & { readonly right: Right },
): Handler {
  return handler(async (request, params, visitor) => {
    const session = await sessionOf(visitor)
    const { person } = session
    const { account: slug = "", ...rest } = params
    const membership = await findMembership({ user_id: person.id, slug })
    if (!membership)
      throw new TarnwrightError("not_found", "There is no such account, or you do not belong to it.")
    const { account, role } = membership
    if (account.status === "suspended" && request.method !== "GET") {
      throw new TarnwrightError(
        "account_suspended",
        "This account is suspended: it can be read but not changed.",
      )
    }
    const { ip, now, request_id } = visitor
    const ctx: Ctx = {
      account_id: account.id,
      actor: { kind: "user", id: person.id, role },
      ip,
      now,
      request_id,
    }
    authorize(ctx.actor, endpoint.right)
    const input = await inputOf(endpoint.input, request, rest, endpoint.limit_bytes)
    if (needsFresh(endpoint, input)) requireFresh(session, now)
    return endpoint.run({ ctx, person, input })
  })
}

/** A route of whoever is signed in, about themselves and no account. */
export function personEndpoint<Schema extends z.ZodType>(
  endpoint: Endpoint<
    Schema,
    { readonly visitor: Visitor; readonly person: Person; readonly session_id: string }
  >,
): Handler {
  return handler(async (request, params, visitor) => {
    const session = await sessionOf(visitor)
    const { person, session_id } = session
    const input = await inputOf(endpoint.input, request, params)
    if (needsFresh(endpoint, input)) requireFresh(session, visitor.now)
    return endpoint.run({ visitor, person, session_id, input })
  })
}

/** A route of the admin area; for anyone but an admin it does not exist, and without a second factor it is closed. */
export function adminEndpoint<Schema extends z.ZodType>(
  endpoint: Endpoint<Schema, { readonly ctx: Omit<Ctx, "account_id"> }>,
): Handler {
  return handler(async (request, params, visitor) => {
    const session = await sessionOf(visitor)
    const { person } = session
    if (!person.is_admin) throw new TarnwrightError("not_found", "There is nothing here.")
    if (!session.second_factor) {
      throw new TarnwrightError("forbidden", "Set up your second factor first: open the admin area.")
    }
    const { ip, now, request_id } = visitor
    const ctx = { actor: { kind: "admin", id: person.id }, ip, now, request_id } as const
    const input = await inputOf(endpoint.input, request, params)
    if (needsFresh(endpoint, input)) requireFresh(session, now)
    return endpoint.run({ ctx, input })
  })
}

// Long enough to cover what a known address costs beyond an unknown one, so that the time says nothing of it.
const openAnswer_ms = 400

/** A route for whoever is not signed in: sign-up and reset. */
export function openEndpoint<Schema extends z.ZodType>(
  endpoint: Endpoint<Schema, { readonly visitor: Visitor }>,
): Handler {
  return handler(async (request, params, visitor) => {
    const input = await inputOf(endpoint.input, request, params)
    const [done] = await Promise.all([
      endpoint.run({ visitor, input }),
      new Promise((resolve) => setTimeout(resolve, openAnswer_ms)),
    ])
    return done
  })
}

function handler(run: (request: Request, params: Params, visitor: Visitor) => Promise<unknown>): Handler {
  return async (request, context) => {
    const visitor = visitorOf((name) => request.headers.get(name))
    const requestId = visitor.request_id ?? ""
    try {
      refuseOtherSites(request)
      const done = await run(request, await context.params, visitor)
      return done instanceof Response ? done : answer(done, requestId)
    } catch (error) {
      return refuse(error, requestId)
    }
  }
}

function needsFresh<Schema extends z.ZodType>(
  { fresh = false }: Pick<Endpoint<Schema, unknown>, "fresh">,
  input: z.output<Schema>,
): boolean {
  return typeof fresh === "function" ? fresh(input) : fresh
}

async function sessionOf(visitor: Visitor): Promise<ReadSession> {
  const cookie = (await cookies()).get(sessionCookieName())
  const session = await readSession(cookie?.value, visitor.now)
  if (!session) throw new TarnwrightError("session_missing", "Your session has ended. Sign in again.")
  return session
}
