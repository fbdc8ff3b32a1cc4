import { pdfAnswer } from "@/app/report/pdf/answer"
import { describeAccount } from "@/lib/accounts"
import { showReport } from "@/lib/reports"
import { accountEndpoint } from "../../../../endpoint"
import { ofReport } from "../../../../schemas"

export const GET = accountEndpoint({
  right: "report.read",
  input: ofReport,
  async run({ ctx, input }) {
    const [report, { name }] = await Promise.all([showReport({ ctx, input }), describeAccount({ ctx })])
    return pdfAnswer({ ...report, account_name: name })
  },
})
