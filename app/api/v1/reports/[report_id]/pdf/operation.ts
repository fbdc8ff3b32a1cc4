import { z } from "zod"
import { renderReport } from "@/app/report/pdf/render"
import { describeAccount } from "@/lib/accounts"
import { defineOperation } from "@/lib/api/define-operation"
import { showReport } from "@/lib/reports"
import { exampleReport, reportId } from "../../shown-report"

export const readReportPdf = defineOperation({
  id: "readReportPdf",
  method: "GET",
  path: "/reports/{report_id}/pdf",
  tag: "Reports",
  summary: "A report as a PDF",
  access: { kind: "key", scope: "reports" },
  units: 0,
  pdf: true,
  request: z.strictObject({ report_id: reportId }),
  response: z.custom<Uint8Array>(),
  example: { request: { report_id: exampleReport.id }, response: new Uint8Array() },
  async run({ input, caller: { ctx } }) {
    const [report, { name }] = await Promise.all([showReport({ ctx, input }), describeAccount({ ctx })])
    return renderReport({ ...report, account_name: name })
  },
})
