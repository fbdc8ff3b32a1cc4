import { type ApiError, cardDeclined } from "../core/errors"

/** How a practice card behaves; the last four digits say so to a person. @source Stripe docs, "Test cards" */
export type CardKind = "pays" | "declines" | "no_funds" | "asks" | "fails_later"

interface Card {
  last4: string
  /** Name of the payment method in Stripe's test mode, so that one contract suite serves both. */
  token: string
  label: string
}

export const CARDS: Record<CardKind, Card> = {
  pays: { last4: "4242", token: "pm_card_visa", label: "pays" },
  declines: { last4: "0002", token: "pm_card_chargeDeclined", label: "is declined" },
  no_funds: {
    last4: "9995",
    token: "pm_card_chargeDeclinedInsufficientFunds",
    label: "has not enough money",
  },
  asks: { last4: "3184", token: "pm_card_authenticationRequired", label: "asks its owner to confirm" },
  fails_later: {
    last4: "0341",
    token: "pm_card_chargeCustomerFail",
    label: "can be saved, then is declined",
  },
}

export function isCardKind(value: string): value is CardKind {
  return Object.hasOwn(CARDS, value)
}

export function kindOfToken(token: string): CardKind | undefined {
  return (Object.keys(CARDS) as CardKind[]).find((kind) => CARDS[kind].token === token)
}

/** Why a charge to the card fails; undefined when it goes through. `confirmed`: the owner has just approved it. */
export function refusal(kind: CardKind, confirmed: boolean): ApiError | undefined {
  switch (kind) {
    case "pays":
      return undefined
    case "asks":
      return confirmed
        ? undefined
        : cardDeclined(
            "authentication_required",
            "Your card was declined. This transaction requires authentication.",
            "authentication_required",
          )
    case "no_funds":
      return cardDeclined("insufficient_funds", "Your card has insufficient funds.")
    case "declines":
    case "fails_later":
      return cardDeclined("generic_decline", "Your card was declined.")
  }
}

/** Whether the card cannot even be saved. */
export function refusesSaving(kind: CardKind): boolean {
  return kind === "declines" || kind === "no_funds"
}
