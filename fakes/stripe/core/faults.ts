import { z } from "zod"
import type { State } from "./state"

const times = z.number().int().min(1).max(1000).default(1)
const type = z.string().optional()
const method = z.enum(["GET", "POST", "DELETE"]).optional()
/** Beginning of the path; without it a fault meets any call. */
const path = z.string().startsWith("/").optional()
const customer = z.string().optional()

/** What `POST /_fake/faults` takes: a fault meets the next `times` things that it fits, then it is spent. */
export const faultRequest = z.discriminatedUnion("kind", [
  z.strictObject({
    kind: z.enum(["error_before", "error_after"]),
    status: z.number().int().min(400).max(599).default(500),
    should_retry: z.boolean().optional(),
    times,
    method,
    path,
  }),
  z.strictObject({ kind: z.literal("truncate"), times, method, path }),
  z.strictObject({ kind: z.literal("drop_connection"), times, method, path }),
  z.strictObject({
    kind: z.literal("slow"),
    seconds: z.number().min(0).max(600).default(90),
    times,
    method,
    path,
  }),
  z.strictObject({ kind: z.literal("webhook_delay"), seconds: z.number().min(0).max(3600), times, type }),
  z.strictObject({
    kind: z.literal("webhook_duplicate"),
    copies: z.number().int().min(1).max(20).default(1),
    times,
    type,
  }),
  /** Holds `times` deliveries back and sends them in the opposite order. */
  z.strictObject({ kind: z.literal("webhook_reorder"), times: z.number().int().min(2).max(100), type }),
  z.strictObject({
    kind: z.enum(["webhook_drop", "webhook_bad_signature", "webhook_stale", "webhook_future"]),
    times,
    type,
  }),
  z.strictObject({ kind: z.literal("meter_async_error"), times, customer }),
  z.strictObject({ kind: z.literal("decline_renewal"), times, customer }),
])

export type Fault = z.output<typeof faultRequest>
export type FaultKind = Fault["kind"]
type Of<Name extends FaultKind, All = Fault> = All extends { kind: infer Kind }
  ? [Name & Kind] extends [never]
    ? never
    : All
  : never

/** Takes one use of the oldest fault of these kinds that fits, if any. */
export function takeFault<Name extends FaultKind>(
  state: State,
  kinds: readonly Name[],
  about: { method?: string; path?: string; type?: string; customer?: string | null },
): Of<Name> | undefined {
  const found = state.faults.find(
    (fault) => (kinds as readonly string[]).includes(fault.kind) && fits(fault, about),
  )
  if (!found) return undefined
  found.times -= 1
  state.faults = state.faults.filter((fault) => fault.times > 0)
  return { ...found } as Of<Name>
}

function fits(fault: Fault, about: Parameters<typeof takeFault>[2]): boolean {
  return (
    (!("method" in fault) || !fault.method || fault.method === about.method) &&
    (!("path" in fault) || !fault.path || Boolean(about.path?.startsWith(fault.path))) &&
    (!("type" in fault) || !fault.type || fault.type === about.type) &&
    (!("customer" in fault) || !fault.customer || fault.customer === about.customer)
  )
}
