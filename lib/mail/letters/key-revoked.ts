import type { Letter } from "../compose"

export interface KeyRevokedData {
  account_name: string
  key_name: string
  last4: string
  /** Who did it, as `Ada Fern` or `the Tarnwright team`. */
  revoked_by: string
  /** Empty when none was given. */
  reason: string
  keys_url: string
}

export function keyRevoked(data: KeyRevokedData): Letter {
  const { account_name, key_name, last4, revoked_by, reason, keys_url } = data
  return {
    subject: `A key of ${account_name} was revoked`,
    paragraphs: [
      `The key “${key_name}”, ending in ${last4}, was revoked by ${revoked_by} and no longer works.`,
      ...(reason === "" ? [] : [`The reason given: ${reason}`]),
      "Whatever used it needs a new key.",
    ],
    action: { label: "See your keys", url: keys_url },
    reason: `You receive this as an owner of ${account_name}.`,
  }
}
