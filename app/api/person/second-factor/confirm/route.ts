import { codeInput } from "@/app/api/auth/schemas"
import { personEndpoint } from "@/app/api/portal/endpoint"
import { confirmSecondFactor } from "@/lib/accounts"

export const POST = personEndpoint({ input: codeInput, fresh: true, run: confirmSecondFactor })
