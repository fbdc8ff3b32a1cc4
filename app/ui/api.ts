import type { FieldValues, Path, UseFormSetError } from "react-hook-form"
import type { Problem } from "@/lib/api/problem"

/** A refusal of one of our routes, as its problem document says it. */
export class ApiProblem extends Error {
  constructor(readonly problem: Pick<Problem, "status" | "detail" | "code" | "errors">) {
    super(problem.detail)
    this.name = "ApiProblem"
  }
}

type Method = "GET" | "POST" | "PATCH" | "DELETE"

/**
 * Asks one of our own routes. Where it first wants to know that it is still the same person, they are asked, and the
 * request is made again.
 *
 * @throws ApiProblem when it refuses, cannot be reached, or answers with something else than JSON.
 */
export async function ask<Answer>(method: Method, path: string, body?: unknown): Promise<Answer> {
  try {
    return await askOnce<Answer>(method, path, body)
  } catch (error) {
    const wantsToKnow = error instanceof ApiProblem && error.problem.code === "step_up_required"
    if (!wantsToKnow || !(await confirmed())) throw error
    return askOnce<Answer>(method, path, body)
  }
}

let confirmIdentity: (() => Promise<boolean>) | undefined
let confirming: Promise<boolean> | undefined

/** Says who asks the person whether it is them; gives back how to end that. */
export function onStepUp(confirm: () => Promise<boolean>): () => void {
  confirmIdentity = confirm
  return () => {
    if (confirmIdentity === confirm) confirmIdentity = undefined
  }
}

/** Requests that are refused together ask once. */
async function confirmed(): Promise<boolean> {
  confirming ??= confirmIdentity?.().finally(() => {
    confirming = undefined
  })
  return (await confirming) ?? false
}

async function askOnce<Answer>(method: Method, path: string, body?: unknown): Promise<Answer> {
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
