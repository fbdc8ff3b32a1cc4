import { insightsOf } from "@/app/portal/insights-of"
import { accountEndpoint } from "../../endpoint"
import { insightsInput } from "../../schemas"

export const GET = accountEndpoint({ right: "insight.read", input: insightsInput, run: insightsOf })
