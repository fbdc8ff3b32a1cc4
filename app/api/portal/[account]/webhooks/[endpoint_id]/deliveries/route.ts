import { newestDeliveries } from "@/app/portal/newest-deliveries"
import { accountEndpoint } from "../../../../endpoint"
import { ofEndpoint } from "../../schemas"

export const GET = accountEndpoint({ right: "webhook.read", input: ofEndpoint, run: newestDeliveries })
