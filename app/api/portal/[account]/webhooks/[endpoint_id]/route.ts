import { deleteEndpoint, updateEndpoint } from "@/lib/webhooks"
import { accountEndpoint } from "../../../endpoint"
import { endpointChange, ofEndpoint } from "../schemas"

export const PATCH = accountEndpoint({ right: "webhook.manage", input: endpointChange, run: updateEndpoint })

export const DELETE = accountEndpoint({ right: "webhook.manage", input: ofEndpoint, run: deleteEndpoint })
