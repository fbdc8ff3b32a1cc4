import { startCheckout } from "@/lib/billing"
import { accountEndpoint } from "../../../endpoint"
import { checkoutInput } from "../../../schemas"

export const POST = accountEndpoint({ right: "billing.manage", input: checkoutInput, run: startCheckout })
