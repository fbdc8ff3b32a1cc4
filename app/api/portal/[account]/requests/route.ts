import { newestRequests } from "@/app/portal/newest-requests"
import { accountEndpoint } from "../../endpoint"
import { requestsInput } from "../../schemas"

export const GET = accountEndpoint({ right: "request.read", input: requestsInput, run: newestRequests })
