import { z } from "zod"
import { ENGINE_VERSION } from "@/lib/chemistry/engine-version"
import { type Report, type ReportLine, reportKindNames, sharedUrl } from "@/lib/reports"

export const reportId = z.string().min(1).max(64).meta({ description: "Id of the report" })

export const title = z.string().trim().max(120).meta({ description: "Heading of the sheet" })

export const shopper = z
  .string()
  .trim()
  .max(120)
  .meta({ description: "Whom it is for, as you write it; never on the shared page" })

/** A report in a list. */
export const shownLine = z
  .object({
    id: reportId,
    kind: z.enum(reportKindNames).meta({ description: "What was calculated" }),
    title: z.string(),
    shopper: z.string().nullable(),
    engine_version: z.string().meta({ description: "Version of the engine that calculated it" }),
    created_at: z.iso.datetime(),
    shared_url: z
      .url()
      .nullable()
      .meta({ description: "Page that needs no key; null while it is not shared" }),
  })
  .meta({ id: "Report" })

/** A report with what was asked and answered. */
export const shownReport = shownLine
  .extend({
    input: z.record(z.string(), z.unknown()).meta({ description: "The question as it was asked" }),
    answer: z
      .record(z.string(), z.unknown())
      .meta({ description: "What the calculation answered, unchanged" }),
  })
  .meta({ id: "ReportWithAnswer" })

export function showLineAs(report: ReportLine): z.output<typeof shownLine> {
  const { id, kind, title, shopper, engine_version, created_at, share_slug } = report
  return {
    id,
    kind,
    title,
    shopper,
    engine_version,
    created_at: created_at.toISOString(),
    shared_url: share_slug === null ? null : sharedUrl(share_slug),
  }
}

export function showReportAs(report: Report): z.output<typeof shownReport> {
  const { input, answer } = report
  return { ...showLineAs(report), input: { ...input }, answer: { ...answer } }
}

export const exampleLine: z.output<typeof shownLine> = {
  id: "rep_01kbc0x7qzf0ra2w6v8n4m3h5t",
  kind: "carbonate_co2",
  title: "90 cm tank, first reading",
  shopper: null,
  engine_version: ENGINE_VERSION,
  created_at: "2026-12-01T09:30:00.000Z",
  shared_url: null,
}

export const exampleReport: z.output<typeof shownReport> = {
  ...exampleLine,
  input: { ph: 6.8, kh_dkh: 4 },
  answer: { result: { co2_mg_l: 21 } },
}
