import type { z } from "zod"
import type { requestsInput } from "@/app/api/portal/schemas"
import type { Call } from "@/lib/context"
import { type LoggedCall, listCalls } from "@/lib/usage"
import { REQUESTS_A_PAGE } from "./[account]/requests/page-size"

/** A page of the request log. */
export function newestRequests({ ctx, input }: Call<z.output<typeof requestsInput>>): Promise<LoggedCall[]> {
  const { outcome, key_id, before_at, before_id } = input
  const before = before_at === undefined ? undefined : { exact_at: before_at, id: before_id ?? "" }
  return listCalls({ ctx, input: { limit: REQUESTS_A_PAGE, outcome, key_id, before } })
}
