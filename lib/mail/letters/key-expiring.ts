import type { Letter } from "../compose"

export interface KeyExpiringData {
  account_name: string
  key_name: string
  last4: string
  /** When it stops working, RFC 3339. */
  expires_at: string
  /** Whether a successor was made already. */
  rotated: boolean
  keys_url: string
}

export function keyExpiring(data: KeyExpiringData): Letter {
  const { account_name, key_name, last4, expires_at, rotated, keys_url } = data
  const when = new Date(expires_at).toLocaleString("en-GB", {
    dateStyle: "long",
    timeStyle: "short",
    timeZone: "UTC",
  })
  const advice = rotated
    ? "It was rotated: see that whatever used it has its successor by then."
    : "Rotate it, and give the new key to whatever uses it. Both work during the overlap that you choose."
  return {
    subject: `A key of ${account_name} expires soon`,
    paragraphs: [
      `The key “${key_name}”, ending in ${last4}, expires on ${when} (UTC) and is refused from then on.`,
      advice,
    ],
    action: { label: "See your keys", url: keys_url },
    reason: `You receive this as an owner of ${account_name}, 14, 7 and 1 days before a key expires.`,
  }
}
