import Stripe from "stripe"
import { TarnwrightError } from "@/lib/errors"

/** Runs `work`; when Stripe cannot be reached or is too busy, that comes out as `unavailable` and not as a fault of ours. */
export async function reachStripe<T>(work: () => Promise<T>): Promise<T> {
  try {
    return await work()
  } catch (error) {
    if (isPassing(error)) {
      const detail = "The payment service does not answer at the moment. Try again in a minute."
      throw new TarnwrightError("unavailable", detail, { retryAfterS: 60, cause: error })
    }
    throw error
  }
}

function isPassing(error: unknown): boolean {
  return (
    error instanceof Stripe.errors.StripeConnectionError ||
    error instanceof Stripe.errors.StripeRateLimitError ||
    error instanceof Stripe.errors.StripeAPIError
  )
}
