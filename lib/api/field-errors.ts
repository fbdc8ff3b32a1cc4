import type { z } from "zod"
import type { FieldError } from "@/lib/errors"

/** What is wrong with each part of an input, each with a sentence that says how to mend it. */
export function fieldErrors(issue: z.core.$ZodIssue): FieldError[] {
  if (issue.code === "unrecognized_keys") {
    return issue.keys.map((key) => ({
      pointer: pointerTo([...issue.path, key]),
      detail: "There is no such field. Check its spelling and its unit.",
    }))
  }
  return [{ pointer: pointerTo(issue.path), detail: detailOf(issue) }]
}

function detailOf(issue: z.core.$ZodIssue): string {
  switch (issue.code) {
    case "invalid_type":
      if (issue.input === undefined) return `This field is missing. Send ${articled(issue.expected)}.`
      return `Send ${articled(issue.expected)}, not ${described(issue.input)}.`
    case "too_small":
      return `${amountOf(issue.origin)} at least ${issue.minimum}.`
    case "too_big":
      return `${amountOf(issue.origin)} at most ${issue.maximum}.`
    case "invalid_value":
      return issue.values.length === 1
        ? `Send ${quoted(issue.values)}.`
        : `Send one of ${quoted(issue.values)}.`
    case "invalid_union":
      return "The value has none of the forms that fit here. See the reference for them."
    default:
      return issue.message
  }
}

function amountOf(origin: string): string {
  switch (origin) {
    case "string":
      return "Its number of characters must be"
    case "array":
      return "Its number of items must be"
    default:
      return "The value must be"
  }
}

function articled(expected: string): string {
  return /^[aeio]/.test(expected) ? `an ${expected}` : `a ${expected}`
}

function described(input: unknown): string {
  if (input === null) return "null"
  if (Array.isArray(input)) return "an array"
  if (typeof input === "number") return Number.isFinite(input) ? String(input) : "a number too large to hold"
  if (typeof input === "string") return `the text ${JSON.stringify(input.slice(0, 40))}`
  return articled(typeof input)
}

function quoted(values: readonly unknown[]): string {
  return values.map((value) => JSON.stringify(value)).join(", ")
}

/** @source RFC 6901: `~` and `/` in a member's name are escaped. */
function pointerTo(path: readonly PropertyKey[]): string {
  return path.map((part) => `/${String(part).replaceAll("~", "~0").replaceAll("/", "~1")}`).join("")
}
