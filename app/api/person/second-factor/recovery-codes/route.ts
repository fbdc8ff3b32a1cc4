import { personEndpoint } from "@/app/api/portal/endpoint"
import { nothing } from "@/app/api/portal/schemas"
import { renewRecoveryCodes } from "@/lib/accounts"

export const POST = personEndpoint({ input: nothing, fresh: true, run: renewRecoveryCodes })
