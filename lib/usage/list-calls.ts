import { sql } from "kysely"
import { withTenant } from "@/db"
import type { Ctx } from "@/lib/context"
import type { ErrorCode, FieldError } from "@/lib/errors"

/** One call in the account's request log: a success from the ledger, or a refusal with its reason. */
export interface LoggedCall {
  /** Of the row in the log; a request's own id may come from its client, and more than once. */
  readonly id: string
  readonly at: Date
  /** The same instant to the microsecond, which a place in the log needs. */
  readonly exact_at: string
  readonly request_id: string
  readonly key_id: string
  readonly mode: "live" | "sandbox"
  /** Operation of a success; method and path of a refusal. */
  readonly what: string
  readonly status: number
  /** How many calls the row stands for: a run of one operation in a batch is one row. */
  readonly calls: number
  readonly units: number
  readonly code: ErrorCode | null
  readonly detail: string | null
  readonly errors: readonly FieldError[]
}

export interface LogQuery {
  readonly limit: number
  /** Calls before this row: the last one of the page before. */
  readonly before?: Pick<LoggedCall, "exact_at" | "id"> | undefined
  readonly outcome?: "success" | "refused" | undefined
  readonly key_id?: string | undefined
}

/** Days that the request log reaches back. */
export const LOG_DAYS = 30

/** The account's calls, newest first. Bodies are not kept, so they cannot be shown. */
export function listCalls({ ctx, input }: { ctx: Ctx; input: LogQuery }): Promise<LoggedCall[]> {
  const { limit, before, outcome, key_id } = input
  return withTenant(ctx.account_id, async (trx) => {
    const { rows } = await sql<LoggedCall>`
      select *, to_char(at at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.US"Z"') as exact_at from (
        select id, at, request_id, key_id, mode, operation as what, 200 as status, calls, units, null as code, null as detail,
               '[]'::jsonb as errors
          from usage_event where account_id = ${ctx.account_id} and ${outcome !== "refused"}
        union all
        select id, at, id, key_id, mode, method || ' ' || path, status, 1, 0, code, detail, errors
          from refused_call where account_id = ${ctx.account_id} and ${outcome !== "success"}
      ) call
      where at > now() - make_interval(days => ${LOG_DAYS})
        and (${before?.exact_at ?? null}::timestamptz is null
             or (at, id) < (${before?.exact_at ?? null}::timestamptz, ${before?.id ?? null}::text))
        and (${key_id ?? null}::text is null or key_id = ${key_id ?? null})
      order by at desc, id desc
      limit ${limit}`.execute(trx)
    return rows
  })
}
