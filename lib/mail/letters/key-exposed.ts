import type { Letter } from "../compose"

export interface KeyExposedData {
  account_name: string
  key_name: string
  last4: string
  keys_url: string
}

export function keyExposed({ account_name, key_name, last4, keys_url }: KeyExposedData): Letter {
  return {
    subject: `A server key of ${account_name} stands in a web page`,
    paragraphs: [
      `A browser sent the server key “${key_name}”, ending in ${last4}. We refused the call.`,
      "A server key is secret: whoever opens that page can read it. Rotate it now, and give the page a browser key, which works from your own origins only.",
    ],
    action: { label: "Rotate the key", url: keys_url },
    reason: `You receive this as an owner of ${account_name}, at most once a day for a key.`,
  }
}
