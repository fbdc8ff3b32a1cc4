import { invalid } from "./errors"
import type { Fake } from "./fake"
import type { Kind } from "./state"

const MAX_DEPTH = 4
/** Kept in the stored object, sent only when a caller asks for it. */
const HIDDEN: Record<string, string[]> = { price: ["tiers"], "checkout.session": ["line_items"] }
const NOT_EXPANDABLE = new Set(["id", "object", "client_reference_id", "lookup_key", "url"])

/**
 * The answer as the wire carries it: a copy with the asked-for ids replaced by their objects and the fields that
 * need asking left out otherwise. @source Stripe API reference, "Expanding responses"
 *
 * @throws ApiError 400 for a path that leads to no object
 */
export function present(fake: Fake, answer: object, paths: readonly string[]): unknown {
  const copy = structuredClone(answer) as Record<string, unknown>
  const kept = new Set<object>()
  for (const path of paths) {
    const parts = path.split(".")
    if (parts.length > MAX_DEPTH)
      throw invalid(`You cannot expand more than ${MAX_DEPTH} levels: ${path}`, "expand")
    follow(fake, copy, parts, path, kept)
  }
  return strip(copy, kept)
}

function follow(
  fake: Fake,
  at: Record<string, unknown>,
  parts: string[],
  path: string,
  kept: Set<object>,
): void {
  const [head, ...rest] = parts
  const value = at[head!]
  if (value === undefined || NOT_EXPANDABLE.has(head!)) {
    throw invalid(`This property cannot be expanded (${head}).`, "expand")
  }
  if (Array.isArray(value)) {
    kept.add(value)
    for (const [index, item] of value.entries()) {
      if (typeof item === "string") value[index] = objectOf(fake, item, head!)
      if (rest.length > 0) follow(fake, value[index] as Record<string, unknown>, rest, path, kept)
    }
    return
  }
  if (value === null) return
  if (typeof value === "string") at[head!] = objectOf(fake, value, head!)
  const next = at[head!] as Record<string, unknown>
  kept.add(next)
  if (rest.length > 0) follow(fake, next, rest, path, kept)
}

function objectOf(fake: Fake, id: string, property: string): unknown {
  for (const kind of Object.keys(fake.state.objects) as Kind[]) {
    const found = fake.state.objects[kind][id]
    if (found) return structuredClone(found)
  }
  throw invalid(`This property cannot be expanded (${property}).`, "expand")
}

function strip(value: unknown, kept: Set<object>): unknown {
  if (Array.isArray(value)) return value.map((item) => strip(item, kept))
  if (value === null || typeof value !== "object") return value
  const fields = value as Record<string, unknown>
  const hidden = HIDDEN[String(fields.object)] ?? []
  return Object.fromEntries(
    Object.entries(fields)
      .filter(([key, child]) => !hidden.includes(key) || kept.has(child as object))
      .map(([key, child]) => [key, strip(child, kept)]),
  )
}
