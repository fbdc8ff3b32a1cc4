import { exportEnquiries } from "@/lib/enquiries"
import { accountEndpoint } from "../../../endpoint"
import { nothing } from "../../../schemas"

export const POST = accountEndpoint({
  right: "enquiry.export",
  fresh: true,
  input: nothing,
  run: exportEnquiries,
})
