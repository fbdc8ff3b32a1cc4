import type { Letter } from "../compose"

export function signInLink({ name, url }: { name: string; url: string }): Letter {
  return {
    subject: "Your link to sign in to Tarnwright",
    paragraphs: [
      `Hello ${name},`,
      "here is the link that signs you in without your password. It works once, within 30 minutes.",
    ],
    action: { label: "Sign in", url },
    reason:
      "Someone asked to sign in with this address. If it was not you, do nothing: without this letter nobody comes in.",
  }
}
