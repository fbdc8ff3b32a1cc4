import type { Letter } from "../compose"

export function resetPassword({ name, url }: { name: string; url: string }): Letter {
  return {
    subject: "Set a new password for Tarnwright",
    paragraphs: [
      `Hello ${name},`,
      "here is the link to set a new password. It works once, within 30 minutes, and ends every open session.",
    ],
    action: { label: "Set a new password", url },
    reason:
      "Someone asked for a new password for this address. If it was not you, your password stays as it is.",
  }
}
