import { openBillingPortal } from "@/lib/billing"
import { accountEndpoint } from "../../../endpoint"
import { nothing } from "../../../schemas"

export const POST = accountEndpoint({ right: "billing.manage", input: nothing, run: openBillingPortal })
