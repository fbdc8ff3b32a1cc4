import type { z } from "zod"
import type { Fake } from "./fake"
import { parse } from "./params"

export interface Call<Params> {
  fake: Fake
  params: Params
  /** Values of the `:name` parts of the path. */
  path: Record<string, string>
}

export interface Route {
  method: "GET" | "POST" | "DELETE"
  path: string
  run(fake: Fake, values: unknown, path: Record<string, string>): object
}

/** Declares one operation of the API: parameters by schema, answer by a synchronous function. */
export function route<Schema extends z.ZodType>(
  method: Route["method"],
  path: string,
  schema: Schema,
  handle: (call: Call<z.output<Schema>>) => object,
): Route {
  return {
    method,
    path,
    run: (fake, values, parts) => handle({ fake, params: parse(schema, values), path: parts }),
  }
}

/** The route for a call, and the values in its path. Literal parts win over `:name` parts. */
export function match(
  routes: readonly Route[],
  method: string,
  pathname: string,
): { route: Route; path: Record<string, string> } | undefined {
  const parts = pathname.split("/")
  const candidates = routes
    .filter((route) => route.method === method)
    .map((route) => ({ route, path: valuesIn(route.path.split("/"), parts) }))
    .filter((candidate) => candidate.path !== undefined)
    .sort((a, b) => Object.keys(a.path!).length - Object.keys(b.path!).length)
  const best = candidates[0]
  return best && { route: best.route, path: best.path! }
}

function valuesIn(pattern: string[], parts: string[]): Record<string, string> | undefined {
  if (pattern.length !== parts.length) return undefined
  const values: Record<string, string> = {}
  for (const [index, expected] of pattern.entries()) {
    const actual = parts[index]!
    if (expected.startsWith(":") && actual !== "") values[expected.slice(1)] = decodeURIComponent(actual)
    else if (expected !== actual) return undefined
  }
  return values
}
