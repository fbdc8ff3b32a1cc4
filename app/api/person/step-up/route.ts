import { stepUpInput } from "@/app/api/auth/schemas"
import { personEndpoint } from "@/app/api/portal/endpoint"
import { stepUp } from "@/lib/accounts"

export const POST = personEndpoint({ input: stepUpInput, run: stepUp })
