import { withdraw } from "@/lib/enquiries"
import { openEndpoint } from "../portal/endpoint"
import { withdrawalInput } from "../portal/schemas"

export const POST = openEndpoint({
  input: withdrawalInput,
  run: ({ input: { token }, visitor: { now } }) => withdraw({ token, now }),
})
