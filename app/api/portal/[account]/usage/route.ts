import { usageOf } from "@/app/portal/usage-of"
import { accountEndpoint } from "../../endpoint"
import { usageInput } from "../../schemas"

export const GET = accountEndpoint({ right: "usage.read", input: usageInput, run: usageOf })
