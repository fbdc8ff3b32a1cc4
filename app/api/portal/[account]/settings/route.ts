import { renameAccount } from "@/lib/accounts"
import { accountEndpoint } from "../../endpoint"
import { accountNameInput } from "../../schemas"

export const PATCH = accountEndpoint({ right: "account.manage", input: accountNameInput, run: renameAccount })
