import { sendTestEvent } from "@/lib/webhooks"
import { accountEndpoint } from "../../../../endpoint"
import { ofEndpoint } from "../../schemas"

export const POST = accountEndpoint({ right: "webhook.manage", input: ofEndpoint, run: sendTestEvent })
