import { z } from "zod"
import { listFields, listOf } from "@/app/api/v1/list-fields"
import { defineOperation } from "@/lib/api/define-operation"
import { pageOf, positionOf } from "@/lib/cursor"
import { listReports } from "@/lib/reports"
import { keepReport, newReport, REPORT_UNITS } from "./new-report"
import { exampleLine, exampleReport, showLineAs, shownLine, shownReport, showReportAs } from "./shown-report"

const shared = { path: "/reports", tag: "Reports", access: { kind: "key", scope: "reports" } } as const

export const listReportsOperation = defineOperation({
  ...shared,
  id: "listReports",
  method: "GET",
  summary: "Your reports, newest first",
  units: 0,
  request: z.strictObject(listFields),
  response: listOf(shownLine),
  example: { request: {}, response: { data: [exampleLine], next_cursor: null } },
  async run({ input: { limit, cursor }, caller: { ctx } }) {
    const before = cursor === undefined ? undefined : positionOf(ctx, "reports", cursor)
    const reports = await listReports({ ctx, input: { limit: limit + 1, before } })
    return pageOf(ctx, "reports", reports.map(showLineAs), limit, ({ id }) => id)
  },
})

export const createReportOperation = defineOperation({
  ...shared,
  id: "createReport",
  method: "POST",
  status: 201,
  stores: true,
  summary: "Calculate and keep the result",
  description:
    "The result stays as it was calculated, with the engine's version, its cautions and its sources. Read it as JSON " +
    "or as a PDF, or share a page of it that needs no key. The units cover the calculation.",
  units: REPORT_UNITS,
  request: newReport,
  response: shownReport,
  problems: ["out_of_domain"],
  example: {
    request: {
      kind: "carbonate_co2",
      input: { ph: 6.8, kh_dkh: 4 },
      title: "90 cm tank, first reading",
    },
    response: exampleReport,
  },
  async run({ input, caller }) {
    return showReportAs(await keepReport(input, caller))
  },
})
