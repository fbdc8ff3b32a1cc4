import { invite, listInvitations } from "@/lib/team"
import { accountEndpoint } from "../../../endpoint"
import { invitationInput, nothing } from "../../../schemas"

export const GET = accountEndpoint({ right: "team.manage", input: nothing, run: listInvitations })

export const POST = accountEndpoint({
  right: "team.manage",
  input: invitationInput,
  fresh: true,
  run: invite,
})
