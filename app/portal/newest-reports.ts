import type { Ctx } from "@/lib/context"
import { listReports, type ReportLine, reportKinds, sharedUrl } from "@/lib/reports"
import { MOST_SHOWN } from "./[account]/reports/most-shown"

export interface ShownReport extends ReportLine {
  readonly kind_name: string
  readonly shared_url: string | null
}

/** The reports that the page shows. */
export async function newestReports({ ctx }: { ctx: Ctx }): Promise<ShownReport[]> {
  const reports = await listReports({ ctx, input: { limit: MOST_SHOWN } })
  return reports.map((report) => ({
    ...report,
    kind_name: reportKinds[report.kind],
    shared_url: report.share_slug === null ? null : sharedUrl(report.share_slug),
  }))
}
