import { randomBytes } from "node:crypto"
import type { Selectable } from "kysely"
import { Webhook } from "standardwebhooks"
import type { Schema } from "@/db"
import { seal, unseal } from "@/lib/seal"

/** A new signing secret. @source Standard Webhooks specification: `whsec_`, then 24 to 64 random bytes in base64 */
export function newSecret(): string {
  return `whsec_${randomBytes(32).toString("base64")}`
}

export function sealSecret(secret: string, endpoint_id: string): Buffer {
  return seal(secret, placeOf(endpoint_id))
}

export function unsealSecret(sealed: Buffer, endpoint_id: string): string {
  return unseal(sealed, placeOf(endpoint_id))
}

type Secrets = Pick<
  Selectable<Schema["webhook_endpoint"]>,
  "id" | "secret" | "previous_secret" | "previous_secret_until"
>

/**
 * The headers of one attempt. While a secret is being replaced there are two signatures, so that a receiver may know
 * either.
 */
export function signedHeaders(
  endpoint: Secrets,
  message: { readonly event_id: string; readonly payload: string },
  now: Date,
): Record<string, string> {
  const { secret, previous_secret, previous_secret_until } = endpoint
  const overlaps = previous_secret && previous_secret_until && previous_secret_until > now
  const signatures = [secret, ...(overlaps ? [previous_secret] : [])].map((sealed) =>
    new Webhook(unsealSecret(sealed, endpoint.id)).sign(message.event_id, now, message.payload),
  )
  return {
    "webhook-id": message.event_id,
    "webhook-timestamp": String(Math.floor(now.getTime() / 1000)),
    "webhook-signature": signatures.join(" "),
  }
}

function placeOf(endpoint_id: string): string {
  return `webhook_endpoint:${endpoint_id}`
}
