import { rotateKey } from "@/lib/keys"
import { accountEndpoint } from "../../../../endpoint"
import { rotationInput } from "../../../../schemas"

export const POST = accountEndpoint({
  right: "key.rotate",
  input: rotationInput,
  fresh: true,
  run: rotateKey,
})
