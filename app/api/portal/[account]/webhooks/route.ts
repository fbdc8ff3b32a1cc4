import { createEndpoint, listEndpoints } from "@/lib/webhooks"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"
import { newEndpointInput } from "./schemas"

export const GET = accountEndpoint({ right: "webhook.read", input: nothing, run: listEndpoints })

export const POST = accountEndpoint({ right: "webhook.manage", input: newEndpointInput, run: createEndpoint })
