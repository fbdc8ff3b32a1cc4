import { ofSession } from "@/app/api/auth/schemas"
import { personEndpoint } from "@/app/api/portal/endpoint"
import { endOwnSession } from "@/lib/accounts"

export const DELETE = personEndpoint({ input: ofSession, run: endOwnSession })
