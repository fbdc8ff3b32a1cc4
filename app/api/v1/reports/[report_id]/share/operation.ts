import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { shareReport, unshareReport } from "@/lib/reports"
import { exampleReport, reportId } from "../../shown-report"

const shared = {
  path: "/reports/{report_id}/share",
  tag: "Reports",
  access: { kind: "key", scope: "reports" },
  units: 0,
  request: z.strictObject({ report_id: reportId }),
} as const

export const shareReportOperation = defineOperation({
  ...shared,
  id: "shareReport",
  method: "POST",
  summary: "Share a report",
  description:
    "Gives it a page that needs no key, at an address that nobody can guess. A report that is shared keeps its address.",
  response: z.object({ shared_url: z.url() }),
  example: {
    request: { report_id: exampleReport.id },
    response: { shared_url: "https://tarnwright.example/r/8mFqv2Jc0RrYw1xkT5uLhZ3a" },
  },
  async run({ input, caller: { ctx } }) {
    return { shared_url: (await shareReport({ ctx, input })).url }
  },
})

export const unshareReportOperation = defineOperation({
  ...shared,
  id: "unshareReport",
  method: "DELETE",
  status: 204,
  summary: "End the sharing of a report",
  description: "Its page is gone at once. Shared again, it gets another address.",
  response: z.undefined(),
  example: { request: { report_id: exampleReport.id }, response: undefined },
  async run({ input, caller: { ctx } }) {
    await unshareReport({ ctx, input })
    return undefined
  },
})
