import type { Letter } from "../compose"

export interface MembershipChangedData {
  name: string
  account_name: string
  /** The new role; null when they were taken out of the account. */
  role: string | null
}

export function membershipChanged({ name, account_name, role }: MembershipChangedData): Letter {
  return {
    subject: role ? `Your role in ${account_name} is now ${role}` : `You no longer belong to ${account_name}`,
    paragraphs: [
      `Hello ${name},`,
      role
        ? `an owner of ${account_name} on Tarnwright changed your role to ${role}.`
        : `an owner took you out of ${account_name} on Tarnwright. Your own sign-in stays.`,
    ],
    reason: `You receive this because you ${role ? "belong" : "belonged"} to ${account_name}.`,
  }
}
