import { personEndpoint } from "@/app/api/portal/endpoint"
import { nothing } from "@/app/api/portal/schemas"
import { endOtherSessions, listOwnSessions } from "@/lib/accounts"

export const GET = personEndpoint({ input: nothing, run: listOwnSessions })

export const DELETE = personEndpoint({ input: nothing, run: endOtherSessions })
