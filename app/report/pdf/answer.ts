import type { PrintedReport } from "./document"
import { renderReport } from "./render"

/** A report as an answer that a browser shows as a PDF, and saves under the report's title. */
export async function pdfAnswer(report: PrintedReport): Promise<Response> {
  const file = await renderReport(report)
  const name = report.title.replace(/[^\p{L}\p{N}]+/gu, "-").replace(/^-+|-+$/g, "") || "report"
  return new Response(file as BodyInit, {
    headers: {
      "content-type": "application/pdf",
      "content-disposition": `inline; filename*=UTF-8''${encodeURIComponent(`${name}.pdf`)}`,
      "cache-control": "no-store",
      "x-robots-tag": "noindex",
    },
  })
}
