import { leaveAccount } from "@/lib/team"
import { accountEndpoint } from "../../../endpoint"
import { nothing } from "../../../schemas"

export const POST = accountEndpoint({ right: "account.read", input: nothing, run: leaveAccount })
