import Stripe from "stripe"
import { env } from "@/lib/env"

/** Version of the API whose shapes this code reads; the webhook endpoint is made with the same one. */
export const STRIPE_API_VERSION = "2026-10-28.endive" satisfies Stripe.LatestApiVersion

const TIMEOUT_MS = 10_000

// Next bundles its routes apart from the custom server; both share one client and its connections.
const shared = globalThis as typeof globalThis & { tarnwrightStripe?: Stripe }

/**
 * The Stripe client of this process, made on first use.
 *
 * With `STRIPE_FAKE_HOST` it talks to a stand-in. `lib/env.ts` accepts a loopback address there and no other, so that
 * no setting can send a production key across a network in the clear.
 */
export function stripe(): Stripe {
  shared.tarnwrightStripe ??= newClient()
  return shared.tarnwrightStripe
}

function newClient(): Stripe {
  const { STRIPE_SECRET_KEY, STRIPE_FAKE_HOST } = env()
  const [host, port] = STRIPE_FAKE_HOST?.split(":") ?? []
  return new Stripe(STRIPE_SECRET_KEY, {
    apiVersion: STRIPE_API_VERSION,
    timeout: TIMEOUT_MS,
    maxNetworkRetries: 2,
    telemetry: false,
    ...(host && { host, port: Number(port), protocol: "http" as const }),
  })
}
