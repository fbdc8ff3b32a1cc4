import { sendReport } from "@/lib/reports"
import { accountEndpoint } from "../../../../endpoint"
import { reportLetterInput } from "../../../../schemas"

export const POST = accountEndpoint({ right: "report.read", input: reportLetterInput, run: sendReport })
