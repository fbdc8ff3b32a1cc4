import { changeRole, removeMember } from "@/lib/team"
import { accountEndpoint } from "../../../../endpoint"
import { ofMember, roleInput } from "../../../../schemas"

export const PATCH = accountEndpoint({ right: "team.manage", input: roleInput, fresh: true, run: changeRole })

export const DELETE = accountEndpoint({
  right: "team.manage",
  input: ofMember,
  fresh: true,
  run: removeMember,
})
