import type { Letter } from "../compose"

export function alreadySignedUp({ name, sign_in_url }: { name: string; sign_in_url: string }): Letter {
  return {
    subject: "You already have a Tarnwright sign-in",
    paragraphs: [
      `Hello ${name},`,
      "someone just tried to sign up with this address, which already has a sign-in. Nothing has changed. If you do not remember your password, you can set a new one from the sign-in page.",
    ],
    action: { label: "Sign in", url: sign_in_url },
    reason: "Someone signed up with this address. If it was not you, you need not do anything.",
  }
}
