import type { Letter } from "../compose"

export interface InvitationData {
  inviter_name: string
  account_name: string
  role: string
  url: string
}

export function invitation({ inviter_name, account_name, role, url }: InvitationData): Letter {
  return {
    subject: `Join ${account_name} on Tarnwright`,
    paragraphs: [
      `${inviter_name} invites you to ${account_name} on Tarnwright, as ${role}.`,
      "The link works once, within 72 hours.",
    ],
    action: { label: "Accept the invitation", url },
    reason: "A member of an account invited this address. If you do not know them, do nothing.",
  }
}
