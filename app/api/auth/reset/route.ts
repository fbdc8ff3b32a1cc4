import { openEndpoint } from "@/app/api/portal/endpoint"
import { resetPassword } from "@/lib/accounts"
import { resetInput } from "../schemas"

export const POST = openEndpoint({ input: resetInput, run: resetPassword })
