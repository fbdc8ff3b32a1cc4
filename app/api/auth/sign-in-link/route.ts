import { openEndpoint } from "@/app/api/portal/endpoint"
import { requestSignInLink } from "@/lib/accounts"
import { signInLinkInput } from "../schemas"

export const POST = openEndpoint({ input: signInLinkInput, run: requestSignInLink })
