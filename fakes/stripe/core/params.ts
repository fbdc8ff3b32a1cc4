import { z } from "zod"
import { type ApiError, invalid } from "./errors"

/** Readers of form values: everything arrives as text, and an empty text unsets a value. */
export const str = z.string().min(1)
export const int = z
  .string()
  .regex(/^-?\d{1,15}$/)
  .transform(Number)
export const count = z
  .string()
  .regex(/^\d{1,15}$/)
  .transform(Number)
export const bool = z.enum(["true", "false"]).transform((value) => value === "true")
export const decimal = z.string().regex(/^\d{1,12}(\.\d{1,12})?$/)
export const clearable = z.string().transform((value) => (value === "" ? null : value))
/** `metadata[key]=` removes a key and `metadata=` removes all of them. */
export const metadata = z.union([
  z.literal(""),
  z.record(z.string().max(40), z.string().max(500)),
  z.tuple([]),
])
export const range = z.union([
  count,
  z.strictObject({
    gt: count.optional(),
    gte: count.optional(),
    lt: count.optional(),
    lte: count.optional(),
  }),
])

/** Parameters that every list takes. @source Stripe API reference, "Pagination" */
export const page = {
  limit: count.pipe(z.number().min(1).max(100)).default(10),
  starting_after: str.optional(),
  ending_before: str.optional(),
  created: range.optional(),
}

/**
 * Parses parameters against a schema.
 *
 * @throws ApiError 400 in the API's own shape; `parameter_unknown` for what this stand-in does not know, so that
 *   a call which relies on more than it does fails loudly
 */
export function parse<T extends z.ZodType>(schema: T, values: unknown): z.output<T> {
  const outcome = schema.safeParse(values)
  if (outcome.success) return outcome.data
  throw refusal(outcome.error.issues[0]!)
}

export function mergeMetadata(
  before: Record<string, string>,
  change: z.output<typeof metadata> | undefined,
): Record<string, string> {
  if (change === undefined) return before
  if (change === "" || Array.isArray(change)) return {}
  return Object.fromEntries(Object.entries({ ...before, ...change }).filter(([, value]) => value !== ""))
}

export function inRange(value: number, wanted: z.output<typeof range> | undefined): boolean {
  if (wanted === undefined) return true
  if (typeof wanted === "number") return value === wanted
  return (
    (wanted.gt === undefined || value > wanted.gt) &&
    (wanted.gte === undefined || value >= wanted.gte) &&
    (wanted.lt === undefined || value < wanted.lt) &&
    (wanted.lte === undefined || value <= wanted.lte)
  )
}

function refusal(issue: z.core.$ZodIssue): ApiError {
  if (issue.code === "invalid_union" && issue.errors[0]?.[0]) return refusal(deepest(issue))
  if (issue.code === "unrecognized_keys") {
    const param = bracketed([...issue.path, issue.keys[0]!])
    return invalid(`Received unknown parameter: ${param}`, param, "parameter_unknown")
  }
  const param = bracketed(issue.path)
  if (issue.code === "invalid_type" && issue.input === undefined && issue.message.includes("undefined")) {
    return invalid(`Missing required param: ${param}.`, param, "parameter_missing")
  }
  return invalid(`Invalid value for ${param}: ${issue.message}`, param, "parameter_invalid")
}

/** The complaint of the union member that matched furthest, with its path seen from the root. */
function deepest(issue: z.core.$ZodIssueInvalidUnion): z.core.$ZodIssue {
  const issues = issue.errors.flat()
  const furthest = issues.reduce((best, next) => (next.path.length > best.path.length ? next : best))
  return { ...furthest, path: [...issue.path, ...furthest.path] } as z.core.$ZodIssue
}

function bracketed(path: readonly PropertyKey[]): string {
  return path.map((part, index) => (index === 0 ? String(part) : `[${String(part)}]`)).join("")
}
