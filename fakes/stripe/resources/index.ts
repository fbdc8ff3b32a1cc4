import type { Route } from "../core/route"
import { checkoutSessions } from "./checkout-sessions"
import { customers } from "./customers"
import { events, webhookEndpoints } from "./events"
import { invoices } from "./invoices"
import { meterEvents } from "./meter-events"
import { meters } from "./meters"
import { paymentMethods } from "./payment-methods"
import { portalSessions } from "./portal-sessions"
import { prices } from "./prices"
import { products } from "./products"
import { schedules } from "./schedules"
import { subscriptions } from "./subscriptions"
import { testClocks } from "./test-clocks"

/** Every operation of the API that this stand-in knows. */
export const routes: readonly Route[] = [
  ...checkoutSessions,
  ...customers,
  ...events,
  ...invoices,
  ...meterEvents,
  ...meters,
  ...paymentMethods,
  ...portalSessions,
  ...prices,
  ...products,
  ...schedules,
  ...subscriptions,
  ...testClocks,
  ...webhookEndpoints,
]
