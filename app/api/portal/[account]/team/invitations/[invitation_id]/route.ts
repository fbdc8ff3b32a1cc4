import { revokeInvitation } from "@/lib/team"
import { accountEndpoint } from "../../../../endpoint"
import { ofInvitation } from "../../../../schemas"

export const DELETE = accountEndpoint({ right: "team.manage", input: ofInvitation, run: revokeInvitation })
