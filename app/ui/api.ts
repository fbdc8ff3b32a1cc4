import type { FieldValues, Path, UseFormSetError } from "react-hook-form"
import type { Problem } from "@/lib/api/problem"

/** A refusal of one of our routes, as its problem document says it. */
export class ApiProblem extends Error {
  constructor(readonly problem: Pick<Problem, "status" | "detail" | "code" | "errors">) {
    super(problem.detail)
    this.name = "ApiProblem"
  }
}

/**
 * Asks one of our own routes.
 *
 * @throws ApiProblem when it refuses, cannot be reached, or answers with something else than JSON.
 */
export async function ask<Answer>(method: "GET" | "POST" | "PATCH" | "DELETE", path: string, body?: unknown) {
  const response = await fetch(path, {
    method,
    headers: body === undefined ? undefined : { "content-type": "application/json" },
    body: body === undefined ? undefined : JSON.stringify(body),
  }).catch(() => undefined)
  const content: unknown = await response?.json().catch(() => undefined)
  if (response?.ok && content !== undefined) return content as Answer
  if (response && isProblem(content)) throw new ApiProblem(content)
  throw new ApiProblem({
    status: response?.status ?? 0,
    code: "unavailable",
    detail: "We could not be reached. Check your connection and try again.",
  })
}

/** What went wrong, in words for a person. */
export function detailOf(error: unknown): string {
  return error instanceof ApiProblem ? error.problem.detail : "Something failed in this page. Reload it."
}

/** Puts what the server found wrong at the fields it concerns; what concerns none stands at the form (`root`). */
export function showProblem<Values extends FieldValues>(
  error: unknown,
  setError: UseFormSetError<Values>,
  fields: readonly Path<Values>[],
): void {
  const errors = error instanceof ApiProblem ? (error.problem.errors ?? []) : []
  const placed = errors.filter(({ pointer, detail }) => {
    const name = pointer.split("/")[1] as Path<Values> | undefined
    if (!name || !fields.includes(name)) return false
    setError(name, { type: "server", message: detail }, { shouldFocus: true })
    return true
  })
  if (placed.length === 0) setError("root", { type: "server", message: detailOf(error) })
}

function isProblem(content: unknown): content is Problem {
  return typeof content === "object" && content !== null && "detail" in content && "code" in content
}
