import { personEndpoint } from "@/app/api/portal/endpoint"
import { acceptInvitation } from "@/lib/team"
import { ofLink } from "../schemas"

export const POST = personEndpoint({ input: ofLink, run: acceptInvitation })
