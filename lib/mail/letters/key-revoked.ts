import type { Letter } from "../compose"

export interface KeyRevokedData {
  account_name: string
  key_name: string
  last4: string
  reason: string
  keys_url: string
}

export function keyRevoked({ account_name, key_name, last4, reason, keys_url }: KeyRevokedData): Letter {
  return {
    subject: `A key of ${account_name} was revoked`,
    paragraphs: [
      `The key “${key_name}”, ending in ${last4}, was revoked by the Tarnwright team and no longer works.`,
      `The reason given: ${reason}`,
      "Whatever used it needs a new key.",
    ],
    action: { label: "See your keys", url: keys_url },
    reason: `You receive this as an owner of ${account_name}.`,
  }
}
