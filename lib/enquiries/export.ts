import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Ctx } from "@/lib/context"
import { type CsvValue, csvOf } from "@/lib/csv"
import { type Enquiry, enquiryColumns, enquiryOf } from "./enquiry"

/** Columns of the file, in their order: the name in its head and what stands below it. */
const columns: Record<string, (enquiry: Enquiry) => CsvValue> = {
  id: ({ id }) => id,
  created_at: ({ created_at }) => created_at.toISOString(),
  name: ({ name }) => name,
  email: ({ email }) => email,
  message: ({ message }) => message,
  language: ({ language }) => language,
  widget_id: ({ widget_id }) => widget_id,
  page_origin: ({ page_origin }) => page_origin,
  volume_l: ({ tank }) => tank?.volume_l ?? null,
  ph: ({ tank }) => tank?.ph ?? null,
  kh_dkh: ({ tank }) => tank?.kh_dkh ?? null,
  temperature_c: ({ tank }) => tank?.temperature_c ?? null,
  method: ({ tank }) => tank?.method ?? null,
  level: ({ tank }) => tank?.level ?? null,
  verdict: ({ tank }) => tank?.verdict ?? null,
  consented_at: ({ consented_at }) => consented_at.toISOString(),
  consent_version: ({ consent_version }) => consent_version,
  erased_at: ({ erased_at }) => erased_at?.toISOString() ?? null,
}

/** All enquiries of the account as a CSV file, newest first; that somebody took them along is in the audit trail. */
export function exportEnquiries({ ctx }: { ctx: Ctx }): Promise<{ csv: string; rows: number }> {
  return withTenant(ctx.account_id, async (trx) => {
    const stored = await trx
      .selectFrom("enquiry")
      .select(enquiryColumns)
      .where("account_id", "=", ctx.account_id)
      .orderBy("id", "desc")
      .execute()
    const rows = stored.map(enquiryOf).map((enquiry) => Object.values(columns).map((value) => value(enquiry)))
    await recordAct(trx, ctx, { action: "enquiry.exported", detail: { rows: rows.length } })
    return { csv: csvOf(Object.keys(columns), rows), rows: rows.length }
  })
}
