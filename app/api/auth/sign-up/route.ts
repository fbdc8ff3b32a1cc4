import { openEndpoint } from "@/app/api/portal/endpoint"
import { signUp } from "@/lib/accounts"
import { signUpInput } from "../schemas"

export const POST = openEndpoint({ input: signUpInput, run: signUp })
