import { billingOf } from "@/app/portal/billing-of"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"

export const GET = accountEndpoint({ right: "billing.read", input: nothing, run: billingOf })
