import { scopes } from "@/lib/api/define-operation"
import { createKey } from "@/lib/keys"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"

const lifetime_h = 8

/** A sandbox key for one visit to the explorer. The page keeps it in memory, and it dies by itself the same day. */
export const POST = accountEndpoint({
  right: "explorer.use",
  input: nothing,
  run: async ({ ctx }) => {
    const { secret } = await createKey({
      ctx,
      input: {
        kind: "server",
        mode: "sandbox",
        name: "Explorer",
        scopes,
        expires_at: new Date(ctx.now.getTime() + lifetime_h * 3_600_000),
      },
    })
    return { secret }
  },
})
