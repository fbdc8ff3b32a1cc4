import type { Letter } from "../compose"

export interface PaymentFailedData {
  account_name: string
  /** Until when the account works as before, RFC 3339. */
  full_until: string
  billing_url: string
}

export function paymentFailed({ account_name, full_until, billing_url }: PaymentFailedData): Letter {
  const day = new Date(full_until).toLocaleDateString("en-GB", { dateStyle: "long", timeZone: "UTC" })
  return {
    subject: `A payment for ${account_name} did not go through`,
    paragraphs: [
      `The card on file for ${account_name} was declined when the plan was renewed.`,
      `Everything works as before until ${day}. After that, calls beyond the units that your plan includes are refused, and when no payment succeeds the plan ends.`,
      "Use another card, or pay the open invoice, and nothing changes.",
    ],
    action: { label: "Mend the payment", url: billing_url },
    reason: `You receive this as an owner of ${account_name}.`,
  }
}
