import { openEndpoint } from "@/app/api/portal/endpoint"
import { requestPasswordReset } from "@/lib/accounts"
import { resetRequestInput } from "../schemas"

export const POST = openEndpoint({ input: resetRequestInput, run: requestPasswordReset })
