import { revokeKey } from "@/lib/keys"
import { accountEndpoint } from "../../../../endpoint"
import { revocationInput } from "../../../../schemas"

export const POST = accountEndpoint({ right: "key.revoke", input: revocationInput, run: revokeKey })
