import { closeAccount, reopenAccount } from "@/lib/closing"
import { accountEndpoint } from "../../endpoint"
import { closingInput, nothing } from "../../schemas"

export const POST = accountEndpoint({
  right: "account.manage",
  input: closingInput,
  fresh: true,
  run: closeAccount,
})

export const DELETE = accountEndpoint({ right: "account.manage", input: nothing, run: reopenAccount })
