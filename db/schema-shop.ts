import type { ColumnType, Generated } from "kysely"

// What a shop keeps of its own: its parts, its reports, and what its shoppers asked and were asked about.

type CreatedAt = ColumnType<Date, Date | undefined, never>

export interface CatalogItem {
  account_id: string
  id: string
  kind: string
  name: string
  sku: string | null
  url: string | null
  price_minor: number | null
  currency: string | null
  attributes: ColumnType<Record<string, unknown>, string, string>
  created_at: CreatedAt
  updated_at: Generated<Date>
}

export interface Report {
  account_id: string
  id: string
  kind: string
  title: string
  /** Whom it was made for, as the counter wrote it. */
  shopper: string | null
  input: ColumnType<Record<string, unknown>, string, never>
  answer: ColumnType<Record<string, unknown>, string, never>
  engine_version: string
  created_by: string
  created_at: CreatedAt
  share_slug: string | null
}

export interface Enquiry {
  account_id: string
  id: string
  widget_id: string
  page_origin: string
  language: string
  name: string | null
  /** Personal, as the name, the message and the tank: null once it was erased. */
  email: string | null
  message: string | null
  tank: ColumnType<Record<string, unknown> | null, string | null, string | null>
  consent_version: string
  consent_wording: string
  consented_at: Date
  created_at: CreatedAt
  erased_at: Date | null
  erased_by: string | null
}

export interface TankEvent {
  account_id: string
  /** One page view's session; nothing else knows it, so it leads to nobody. */
  session_id: string
  widget_id: string
  /** As `2026-12-01`, in UTC. */
  day: ColumnType<Date, string, string>
  volume_l: number | null
  ph: number | null
  kh_dkh: number | null
  temperature_c: number | null
  method: string | null
  level: string | null
  verdict: string | null
}
