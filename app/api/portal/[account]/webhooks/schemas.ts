import { z } from "zod"
import { deliveryId } from "@/app/api/v1/webhooks/shown-delivery"
import { endpointId, events, targetUrl } from "@/app/api/v1/webhooks/shown-endpoint"

export const newEndpointInput = z.strictObject({ url: targetUrl, events })
export const ofEndpoint = z.strictObject({ endpoint_id: endpointId })
export const endpointChange = ofEndpoint.extend({
  url: targetUrl.optional(),
  events: events.optional(),
  disabled: z.boolean().optional(),
})
export const ofDelivery = ofEndpoint.extend({ delivery_id: deliveryId })
