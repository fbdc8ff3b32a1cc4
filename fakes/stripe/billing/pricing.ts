import type { Objects } from "../core/state"

type Price = Objects["price"]

const SCALE_DIGITS = 12
const SCALE = 10n ** BigInt(SCALE_DIGITS)

/**
 * Amount of a quantity at a price, in minor units, rounded half up once at the end.
 *
 * @source Stripe docs, "Pricing models" (per unit, graduated, volume, transform quantity)
 */
export function amountOf(price: Price, quantity: number): number {
  const counted = transformed(price, quantity)
  if (price.billing_scheme !== "tiered") return rounded(scaled(price.unit_amount_decimal) * BigInt(counted))
  const tiers = price.tiers ?? []
  if (price.tiers_mode === "volume") {
    const tier = tiers.find((one) => one.up_to === null || counted <= one.up_to)
    return tier ? rounded(tierAmount(tier, counted)) : 0
  }
  let total = 0n
  let below = 0
  for (const tier of tiers) {
    const inTier = Math.min(counted, tier.up_to ?? counted) - below
    if (inTier <= 0) break
    total += tierAmount(tier, inTier)
    below += inTier
  }
  return rounded(total)
}

export function scaled(value: string | null): bigint {
  const [whole = "0", part = ""] = (value ?? "0").split(".")
  return BigInt(whole) * SCALE + BigInt(part.padEnd(SCALE_DIGITS, "0").slice(0, SCALE_DIGITS))
}

type Tier = NonNullable<Price["tiers"]>[number]

function tierAmount(tier: Tier, quantity: number): bigint {
  return scaled(tier.unit_amount_decimal) * BigInt(quantity) + scaled(tier.flat_amount_decimal)
}

function transformed(price: Price, quantity: number): number {
  if (!price.transform_quantity) return quantity
  const parts = quantity / price.transform_quantity.divide_by
  return price.transform_quantity.round === "up" ? Math.ceil(parts) : Math.floor(parts)
}

function rounded(amount: bigint): number {
  return Number((amount + SCALE / 2n) / SCALE)
}
