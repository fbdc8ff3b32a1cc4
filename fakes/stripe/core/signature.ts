import { createHmac } from "node:crypto"

/** `Stripe-Signature` header. @source Stripe docs, "Verify webhook signatures manually" */
export function signatureHeader(payload: string, secret: string, timestamp: number): string {
  const digest = createHmac("sha256", secret).update(`${timestamp}.${payload}`).digest("hex")
  return `t=${timestamp},v1=${digest}`
}
