import type { z } from "zod"
import type { Ctx } from "@/lib/context"
import type { ErrorCode } from "@/lib/errors"
import type { Tag } from "./tags"

/** What a server key may be allowed to do. A browser key has `calculate` alone. */
export const scopes = [
  "calculate",
  "reports",
  "catalog",
  "usage",
  "enquiries",
  "insights",
  "webhooks",
] as const
export type Scope = (typeof scopes)[number]

/** Who may call: anybody, a key with the scope, or a widget from one of its origins. */
export type Access =
  | { readonly kind: "public" }
  | { readonly kind: "key"; readonly scope: Scope }
  | { readonly kind: "widget" }

export interface NestedCall {
  readonly path: string
  readonly body?: unknown
}

export interface NestedAnswer {
  readonly status: number
  /** Answer or problem. */
  readonly body: unknown
}

/** What `run` is given besides its parsed input. */
export interface Caller {
  /** Absent where the operation is public. */
  readonly ctx: Ctx
  /** Origin header of the call, where a browser sent one. */
  readonly origin: string | undefined
  /**
   * Meters the call now instead of after `run`: what stores something charges inside its transaction, so that a
   * call which the cap holds back stores nothing.
   */
  charge(): Promise<void>
  /** Performs calculations as the same caller, each validated, metered in its turn and refused as if it came alone. */
  perform(calls: readonly NestedCall[]): Promise<NestedAnswer[]>
}

export interface Operation<Request extends z.ZodType = z.ZodType, Response extends z.ZodType = z.ZodType> {
  /** Unique, camelCase: the operationId of the document and the name in the ledger. */
  readonly id: string
  readonly method: "GET" | "POST" | "PATCH" | "DELETE"
  /** Below `/api/v1`; a parameter stands in braces, `/catalog/items/{item_id}`. */
  readonly path: string
  readonly tag: Tag
  readonly summary: string
  readonly description?: string
  readonly access: Access
  /** Units of one successful call; 0 is not metered. */
  readonly units: number
  /** Body of a POST or PATCH, query of a GET or DELETE, joined with the path's parameters. */
  readonly request: Request
  readonly response: Response
  /** Status of success. */
  readonly status: 200 | 201 | 204
  /** Most calls of one network address in a window, whichever account they concern: what anybody's page may call. */
  readonly perAddress?: { readonly points: number; readonly window_s: number }
  /** A body of CSV instead of JSON: its text is the input's `csv`, beside the query; and its largest size. */
  readonly csv?: { readonly limit_bytes: number }
  /** A success is a PDF file, for which `run` gives the bytes, instead of JSON. */
  readonly pdf?: true
  /** Whether a success stores something, so that an `Idempotency-Key` guards against storing it twice. */
  readonly stores: boolean
  /** Refusals of its own, beyond those that every operation with its access shares. */
  readonly problems: readonly ErrorCode[]
  /** A request that works. `computed`: running it gives the response, so the document runs it. */
  readonly example: { readonly request: z.input<Request>; readonly response: "computed" | z.output<Response> }
  /** Dates of RFC 9745 and RFC 8594, with the page that says what to do. */
  readonly deprecation?: { readonly since: Date; readonly sunset: Date; readonly page: string }
  // A method, so that operations of different shapes fit one registry.
  run(call: { input: z.output<Request>; caller: Caller }): Promise<z.output<Response>> | z.output<Response>
}

export type AnyOperation = Operation

type Defaults = "access" | "status" | "problems" | "stores"

/** Declares an endpoint. Returns data: `serve` gives it a life, `openapi/build` a page, the contract suite a test. */
export function defineOperation<Request extends z.ZodType, Response extends z.ZodType>(
  operation: Omit<Operation<Request, Response>, Defaults> & Partial<Pick<Operation, Defaults>>,
): Operation<Request, Response> {
  return {
    access: { kind: "key", scope: "calculate" },
    status: 200,
    stores: false,
    problems: [],
    ...operation,
  } as Operation<Request, Response>
}
