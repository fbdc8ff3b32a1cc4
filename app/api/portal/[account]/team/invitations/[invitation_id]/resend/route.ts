import { resendInvitation } from "@/lib/team"
import { accountEndpoint } from "../../../../../endpoint"
import { ofInvitation } from "../../../../../schemas"

export const POST = accountEndpoint({ right: "team.manage", input: ofInvitation, run: resendInvitation })
