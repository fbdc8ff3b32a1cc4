import type { Visitor } from "@/lib/accounts"
import { newId } from "@/lib/id"

/** What a request says of whoever sent it. The last hop of `X-Forwarded-For` is ours: server.ts sets it. */
export function visitorOf(header: (name: string) => string | null | undefined): Visitor {
  return {
    now: new Date(),
    ip: header("x-forwarded-for")?.split(",").at(-1)?.trim() || undefined,
    user_agent: header("user-agent") ?? undefined,
    request_id: newId("request"),
  }
}
