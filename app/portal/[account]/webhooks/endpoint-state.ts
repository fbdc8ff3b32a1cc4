import type { Endpoint } from "./webhooks"

/** Whether an endpoint is sent anything, in words. */
export function stateOf({ disabled_at, disabled_reason }: Endpoint): string {
  if (!disabled_at) return "on"
  return disabled_reason === "gone" ? "off: it answered 410" : "paused"
}
