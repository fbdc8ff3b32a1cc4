import { listTeam } from "@/lib/team"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"

export const GET = accountEndpoint({ right: "team.read", input: nothing, run: listTeam })
