import type { Selectable } from "kysely"
import type { Schema } from "@/db"
import type { Tank } from "@/lib/insights"
import type { Language } from "@/lib/mail"

/** What a shopper asked, with the record of their consent. Everything personal is null once it was erased. */
export type Enquiry = Omit<Selectable<Schema["enquiry"]>, "account_id" | "tank" | "language"> & {
  readonly tank: Tank | null
  readonly language: Language
}

export const enquiryColumns = [
  "id",
  "widget_id",
  "page_origin",
  "language",
  "name",
  "email",
  "message",
  "tank",
  "consent_version",
  "consent_wording",
  "consented_at",
  "created_at",
  "erased_at",
  "erased_by",
] as const satisfies readonly (keyof Enquiry)[]

type Stored = Pick<Selectable<Schema["enquiry"]>, (typeof enquiryColumns)[number]>

export function enquiryOf(stored: Stored): Enquiry {
  return { ...stored, language: stored.language as Language, tank: stored.tank as Tank | null }
}
