import { withTenant } from "@/db"
import type { Call, Ctx } from "@/lib/context"
import { type Endpoint, endpointColumns, endpointOf, findEndpoint } from "./endpoint"

/** The account's endpoints, newest first, switched-off ones among them. There are few, so they come at once. */
export async function listEndpoints({ ctx }: { ctx: Ctx }): Promise<Endpoint[]> {
  const stored = await withTenant(ctx.account_id, (trx) =>
    trx
      .selectFrom("webhook_endpoint")
      .select(endpointColumns)
      .where("account_id", "=", ctx.account_id)
      .orderBy("id", "desc")
      .execute(),
  )
  return stored.map(endpointOf)
}

/** @throws TarnwrightError `not_found` when the account has no such endpoint. */
export function showEndpoint({ ctx, input }: Call<{ readonly endpoint_id: string }>): Promise<Endpoint> {
  return withTenant(ctx.account_id, (trx) => findEndpoint(trx, ctx, input.endpoint_id))
}
