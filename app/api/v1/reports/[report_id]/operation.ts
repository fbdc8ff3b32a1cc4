import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { deleteReport, showReport } from "@/lib/reports"
import { exampleReport, reportId, shownReport, showReportAs } from "../shown-report"

const shared = {
  path: "/reports/{report_id}",
  tag: "Reports",
  access: { kind: "key", scope: "reports" },
  units: 0,
  request: z.strictObject({ report_id: reportId }),
} as const

export const readReport = defineOperation({
  ...shared,
  id: "readReport",
  method: "GET",
  summary: "A report",
  response: shownReport,
  example: { request: { report_id: exampleReport.id }, response: exampleReport },
  async run({ input, caller: { ctx } }) {
    return showReportAs(await showReport({ ctx, input }))
  },
})

export const deleteReportOperation = defineOperation({
  ...shared,
  id: "deleteReport",
  method: "DELETE",
  status: 204,
  summary: "Delete a report",
  description: "Its shared page is gone with it.",
  response: z.undefined(),
  example: { request: { report_id: exampleReport.id }, response: undefined },
  async run({ input, caller: { ctx } }) {
    await deleteReport({ ctx, input })
    return undefined
  },
})
