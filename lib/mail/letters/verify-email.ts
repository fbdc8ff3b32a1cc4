import type { Letter } from "../compose"

export function verifyEmail({ name, url }: { name: string; url: string }): Letter {
  return {
    subject: "Confirm your address for Tarnwright",
    paragraphs: [
      `Hello ${name},`,
      "confirm that this address is yours, and your account is open. The link works once, within 24 hours.",
    ],
    action: { label: "Confirm my address", url },
    reason: "Someone signed up with this address. If it was not you, do nothing: no account will be opened.",
  }
}
