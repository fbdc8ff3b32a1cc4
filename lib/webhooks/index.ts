export { createEndpoint, type NewEndpoint } from "./create"
export { deliverWebhook, recoverDeliveries } from "./deliver"
export {
  DELIVERY_DAYS,
  type Delivery,
  type DeliveryQuery,
  listDeliveries,
  replayDelivery,
  sendTestEvent,
  showDelivery,
} from "./deliveries"
export { type Endpoint, MOST_ENDPOINTS } from "./endpoint"
export {
  type SubscribableEvent,
  subscribableEvents,
  type WebhookData,
  type WebhookEventType,
  webhookEvents,
} from "./events"
export { listEndpoints, showEndpoint } from "./list"
export { DELIVER_WEBHOOK, publishEvent } from "./publish"
export { rotateSecret, type SecretRotation, type ShownSecret, showSecret } from "./rotate-secret"
export { type DeliveryFailure, deliveryFailures } from "./send"
export { deleteEndpoint, type EndpointChange, updateEndpoint } from "./update"
