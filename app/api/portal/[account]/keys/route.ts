import { createKey, listKeys } from "@/lib/keys"
import { accountEndpoint } from "../../endpoint"
import { newKeyInput, nothing } from "../../schemas"

export const GET = accountEndpoint({ right: "key.read", input: nothing, run: listKeys })

export const POST = accountEndpoint({
  right: "key.create",
  input: newKeyInput,
  fresh: ({ kind, mode }) => kind === "server" && mode === "live",
  run: ({ ctx, input: { lifetime_days, ...key } }) => {
    const expires_at = lifetime_days ? new Date(ctx.now.getTime() + lifetime_days * 86_400_000) : null
    return createKey({ ctx, input: { ...key, expires_at } })
  },
})
