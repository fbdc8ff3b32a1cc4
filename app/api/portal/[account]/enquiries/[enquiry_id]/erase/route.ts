import { eraseEnquiry } from "@/lib/enquiries"
import { accountEndpoint } from "../../../../endpoint"
import { enquiryInput } from "../../../../schemas"

export const POST = accountEndpoint({ right: "enquiry.erase", input: enquiryInput, run: eraseEnquiry })
