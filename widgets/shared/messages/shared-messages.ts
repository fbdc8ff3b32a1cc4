import type { FieldProblem } from "../field"

/** What every calculator says. Numbers arrive already written for the locale. */
export interface SharedMessages {
  /** Why a field cannot be used; `limit` with its unit. */
  readonly problems: Readonly<Record<FieldProblem, (field: string, limit: string) => string>>
  readonly unitOf: (field: string) => string
  readonly severity: Readonly<Record<"info" | "warning" | "danger", string>>
  readonly cautionsTitle: string
  readonly lastResult: string
  readonly resting: string
  readonly closed: string
  readonly tryAgain: string
  readonly methodTitle: string
  readonly sourcesTitle: string
  readonly engine: (version: string) => string
  readonly ask: string
  readonly askFailed: string
  readonly credit: string
}
