import type { Selectable } from "kysely"
import type { Schema, Trx } from "@/db"
import type { Ctx } from "@/lib/context"
import { env } from "@/lib/env"
import { type FieldError, TarnwrightError } from "@/lib/errors"
import { type SubscribableEvent, subscribableEvents } from "./events"
import { urlProblem } from "./target"

/** An endpoint as its account sees it; its secret is shown by `showSecret` alone. */
export type Endpoint = Omit<
  Selectable<Schema["webhook_endpoint"]>,
  "secret" | "previous_secret" | "previous_secret_until" | "events"
> & {
  readonly events: SubscribableEvent[]
}

/** The columns of an {@link Endpoint}. */
export const endpointColumns = [
  "account_id",
  "id",
  "url",
  "events",
  "created_at",
  "updated_at",
  "disabled_at",
  "disabled_reason",
] as const satisfies readonly (keyof Endpoint)[]

/** Endpoints that an account may have. */
export const MOST_ENDPOINTS = 20

/**
 * One of the account's endpoints, in a transaction of the caller's.
 *
 * @throws TarnwrightError `not_found` when the account has no such endpoint.
 */
export async function findEndpoint(trx: Trx, ctx: Ctx, endpoint_id: string): Promise<Endpoint> {
  const stored = await trx
    .selectFrom("webhook_endpoint")
    .select(endpointColumns)
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", endpoint_id)
    .executeTakeFirst()
  if (!stored) throw new TarnwrightError("not_found", "There is no such endpoint in this account.")
  return endpointOf(stored)
}

/** The stored row as an {@link Endpoint}. */
export function endpointOf(stored: Omit<Endpoint, "events"> & { events: string[] }): Endpoint {
  return { ...stored, events: stored.events as SubscribableEvent[] }
}

/** @throws TarnwrightError `validation_failed` for a URL that webhooks may not go to, and for no or unknown events. */
export function refuseUnfit({ url, events }: { url: string; events: readonly string[] }): void {
  const errors: FieldError[] = []
  const problem = urlProblem(url, { allowLoopback: env().WEBHOOKS_ALLOW_LOOPBACK === "1" })
  if (problem) errors.push({ pointer: "/url", detail: problem })
  if (events.length === 0) errors.push({ pointer: "/events", detail: "Choose at least one event." })
  for (const [index, event] of events.entries()) {
    if ((subscribableEvents as readonly string[]).includes(event)) continue
    errors.push({ pointer: `/events/${index}`, detail: `Choose from ${subscribableEvents.join(", ")}.` })
  }
  const [first] = errors
  if (first) throw new TarnwrightError("validation_failed", first.detail, { errors })
}
