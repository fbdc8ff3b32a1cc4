import { receiveStripeEvent } from "@/lib/billing"

const BODY_LIMIT_BYTES = 1024 * 1024

/** Where Stripe delivers its events. The body is taken as text: a parsed one no longer fits its signature. */
export async function POST(request: Request): Promise<Response> {
  if (Number(request.headers.get("content-length") ?? 0) > BODY_LIMIT_BYTES) return answer(413, "too_large")
  const body = await request.text()
  try {
    const signature = request.headers.get("stripe-signature")
    const receipt = await receiveStripeEvent({ body, signature, now: new Date() })
    return answer(receipt.outcome === "refused" ? 400 : 200, receipt.outcome)
  } catch (error) {
    // Stripe tries again for three days, so that a lost database loses no event.
    if (error instanceof Error && "code" in error && error.code === "unavailable")
      return answer(503, "unavailable")
    throw error
  }
}

function answer(status: number, outcome: string): Response {
  return Response.json({ outcome }, { status, headers: { "cache-control": "no-store" } })
}
