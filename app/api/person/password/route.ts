import { passwordChangeInput } from "@/app/api/auth/schemas"
import { personEndpoint } from "@/app/api/portal/endpoint"
import { changePassword } from "@/lib/accounts"

export const POST = personEndpoint({ input: passwordChangeInput, run: changePassword })
