import type { Call } from "@/lib/context"
import { type Delivery, listDeliveries, showEndpoint } from "@/lib/webhooks"

/** Deliveries that the page of an endpoint shows. */
export const MOST_DELIVERIES = 200

/** The newest deliveries of an endpoint. @throws TarnwrightError `not_found` when the account has no such endpoint. */
export async function newestDeliveries({
  ctx,
  input,
}: Call<{ readonly endpoint_id: string }>): Promise<Delivery[]> {
  await showEndpoint({ ctx, input })
  return listDeliveries({ ctx, input: { ...input, limit: MOST_DELIVERIES } })
}
