import { rotateSecret, showSecret } from "@/lib/webhooks"
import { accountEndpoint } from "../../../../endpoint"
import { ofEndpoint } from "../../schemas"

/** Hours in which a receiver can learn the new secret: both sign meanwhile. */
const OVERLAP_H = 24

export const GET = accountEndpoint({
  right: "webhook.manage",
  input: ofEndpoint,
  fresh: true,
  run: showSecret,
})

export const POST = accountEndpoint({
  right: "webhook.manage",
  input: ofEndpoint,
  fresh: true,
  run: ({ ctx, input }) => rotateSecret({ ctx, input: { ...input, overlap_h: OVERLAP_H } }),
})
