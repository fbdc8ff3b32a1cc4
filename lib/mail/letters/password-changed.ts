import type { Letter } from "../compose"

export function passwordChanged({ name, reset_url }: { name: string; reset_url: string }): Letter {
  return {
    subject: "Your Tarnwright password was changed",
    paragraphs: [
      `Hello ${name},`,
      "the password of this sign-in was just changed and every other session was ended. If you did this, all is well.",
    ],
    action: { label: "It was not me: set a new password", url: reset_url },
    reason: "We always tell the owner of an address when its password changes.",
  }
}
