import { keepReport, newReport, REPORT_UNITS } from "@/app/api/v1/reports/new-report"
import { newestReports } from "@/app/portal/newest-reports"
import { spendUnits } from "@/lib/usage"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"

export const GET = accountEndpoint({ right: "report.read", input: nothing, run: newestReports })

export const POST = accountEndpoint({
  right: "report.create",
  input: newReport,
  async run({ ctx, input }) {
    const charge = () => spendUnits({ ctx, input: { operation: "createReport", units: REPORT_UNITS } })
    const { id } = await keepReport(input, { ctx, charge })
    return { report: { id } }
  },
})
