import { type Fake, idOf } from "../core/fake"
import { newId } from "../core/ids"
import type { Objects } from "../core/state"
import { usage } from "./metering"
import { amountOf } from "./pricing"

export type Line = Objects["invoice"]["lines"]["data"][number]
export type Item = Objects["subscription"]["items"]["data"][number]

interface LineInput {
  item: Item
  amount: number
  description: string
  quantity: number
  period: { start: number; end: number }
  proration?: boolean
}

export function line(input: LineInput): Line {
  const { item, amount } = input
  return {
    id: newId("il"),
    object: "line_item",
    amount,
    currency: item.price.currency,
    description: input.description,
    discount_amounts: [],
    discountable: !input.proration,
    discounts: [],
    invoice: null,
    livemode: false,
    metadata: {},
    parent: {
      invoice_item_details: null,
      subscription_item_details: {
        invoice_item: null,
        proration: input.proration ?? false,
        proration_details: null,
        subscription: item.subscription,
        subscription_item: item.id,
      },
      type: "subscription_item_details",
    },
    period: input.period,
    pretax_credit_amounts: [],
    pricing: {
      price_details: { price: item.price.id, product: idOf(item.price.product)! },
      type: "price_details",
      unit_amount_decimal: item.price.unit_amount_decimal,
    },
    quantity: input.quantity,
    quantity_decimal: String(input.quantity),
    subscription: item.subscription,
    subtotal: amount,
    taxes: [],
  }
}

/** A licensed price is paid ahead for the period. */
export function licensedLine(fake: Fake, item: Item, period: { start: number; end: number }): Line {
  const quantity = item.quantity ?? 1
  const amount = amountOf(item.price, quantity)
  return line({ item, amount, quantity, period, description: `${quantity} × ${productName(fake, item)}` })
}

/** A metered price is paid afterwards, for what the meter counted in the period. */
export function meteredLine(
  fake: Fake,
  item: Item,
  customer: string,
  period: { start: number; end: number },
): Line {
  const meter = fake.get("billing.meter", item.price.recurring!.meter!)
  const quantity = usage(fake, meter, customer, Math.max(period.start, item.created), period.end)
  const amount = amountOf(item.price, quantity)
  return line({
    item,
    amount,
    quantity,
    period,
    description: `${quantity} × ${productName(fake, item)} (used)`,
  })
}

export function isMetered(item: Item): boolean {
  return item.price.recurring?.usage_type === "metered"
}

export function productName(fake: Fake, item: Item): string {
  return fake.state.objects.product[idOf(item.price.product)!]?.name ?? item.price.id
}
