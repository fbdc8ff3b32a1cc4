import { newestEnquiries } from "@/app/portal/newest-enquiries"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"

export const GET = accountEndpoint({ right: "enquiry.read", input: nothing, run: newestEnquiries })
