import { replayDelivery } from "@/lib/webhooks"
import { accountEndpoint } from "../../../../../../endpoint"
import { ofDelivery } from "../../../../schemas"

export const POST = accountEndpoint({ right: "webhook.manage", input: ofDelivery, run: replayDelivery })
