import { setSpendingCap } from "@/lib/billing"
import { accountEndpoint } from "../../../endpoint"
import { spendingCapInput } from "../../../schemas"

export const POST = accountEndpoint({
  right: "billing.manage",
  input: spendingCapInput,
  fresh: true,
  run: setSpendingCap,
})
