import { deleteReport } from "@/lib/reports"
import { accountEndpoint } from "../../../endpoint"
import { ofReport } from "../../../schemas"

// Whose report it is decides, so the verb asks for `report.manage`.
export const DELETE = accountEndpoint({ right: "report.read", input: ofReport, run: deleteReport })
