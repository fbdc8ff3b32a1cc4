import { shareReport, unshareReport } from "@/lib/reports"
import { accountEndpoint } from "../../../../endpoint"
import { ofReport } from "../../../../schemas"

export const POST = accountEndpoint({ right: "report.read", input: ofReport, run: shareReport })

export const DELETE = accountEndpoint({ right: "report.read", input: ofReport, run: unshareReport })
