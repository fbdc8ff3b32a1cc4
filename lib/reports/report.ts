import type { ReportKind } from "./kinds"

/** A result that an account keeps, as it was calculated: a later engine never changes it. */
export interface Report {
  readonly id: string
  readonly kind: ReportKind
  readonly title: string
  /** Whom it was made for, as the counter wrote it; null when it does not say. */
  readonly shopper: string | null
  readonly input: Readonly<Record<string, unknown>>
  readonly answer: ReportAnswer
  readonly engine_version: string
  readonly created_at: Date
  /** Who made it: id of a person or of a key. */
  readonly created_by: string
  /** Last part of the shared page's address; null while it is not shared. */
  readonly share_slug: string | null
}

/** What a calculation of the API answers. */
export interface ReportAnswer {
  readonly result: Readonly<Record<string, unknown>>
  readonly uncertainty: Readonly<Record<string, unknown>>
  readonly cautions: readonly { readonly code: string; readonly severity: string; readonly message: string }[]
  readonly assumptions: readonly { readonly code: string; readonly message: string }[]
  readonly method: {
    readonly name: string
    readonly version: string
    readonly sources: readonly { readonly title: string; readonly year: number; readonly detail: string }[]
  }
  readonly input: Readonly<Record<string, unknown>>
}

/** A report in a list: all but what was calculated. */
export type ReportLine = Omit<Report, "input" | "answer">

export const lineColumns = [
  "id",
  "kind",
  "title",
  "shopper",
  "engine_version",
  "created_at",
  "created_by",
  "share_slug",
] as const

export const reportColumns = [...lineColumns, "input", "answer"] as const
