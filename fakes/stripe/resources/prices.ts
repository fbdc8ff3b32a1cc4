import { z } from "zod"
import { invalid } from "../core/errors"
import type { Fake } from "../core/fake"
import { newId } from "../core/ids"
import { page as pageOf } from "../core/lists"
import { bool, clearable, count, decimal, mergeMetadata, metadata, page, str } from "../core/params"
import { route } from "../core/route"
import type { Objects } from "../core/state"

const newTier = z.strictObject({
  up_to: z.union([z.literal("inf").transform(() => null), count]),
  unit_amount: count.optional(),
  unit_amount_decimal: decimal.optional(),
  flat_amount: count.optional(),
  flat_amount_decimal: decimal.optional(),
})

const newPrice = z.strictObject({
  currency: z.string().regex(/^[a-z]{3}$/),
  product: str,
  active: bool.optional(),
  billing_scheme: z.enum(["per_unit", "tiered"]).default("per_unit"),
  lookup_key: str.max(200).optional(),
  transfer_lookup_key: bool.optional(),
  metadata: metadata.optional(),
  nickname: clearable.optional(),
  recurring: z
    .strictObject({
      interval: z.enum(["day", "week", "month", "year"]),
      interval_count: count.pipe(z.number().min(1)).default(1),
      usage_type: z.enum(["licensed", "metered"]).default("licensed"),
      meter: str.optional(),
    })
    .optional(),
  tax_behavior: z.enum(["inclusive", "exclusive", "unspecified"]).optional(),
  tiers: z.array(newTier).min(1).optional(),
  tiers_mode: z.enum(["graduated", "volume"]).optional(),
  transform_quantity: z.strictObject({ divide_by: count, round: z.enum(["up", "down"]) }).optional(),
  unit_amount: count.optional(),
  unit_amount_decimal: decimal.optional(),
})

export const prices = [
  route("POST", "/v1/prices", newPrice, ({ fake, params }) => {
    check(fake, params)
    const tiered = params.billing_scheme === "tiered"
    const amount = amountFields(params.unit_amount, params.unit_amount_decimal)
    const price = fake.put("price", {
      id: newId("price"),
      object: "price",
      active: params.active ?? true,
      billing_scheme: params.billing_scheme,
      created: fake.now(),
      currency: params.currency,
      custom_unit_amount: null,
      livemode: false,
      lookup_key: takeLookupKey(fake, params.lookup_key, params.transfer_lookup_key ?? false),
      metadata: mergeMetadata({}, params.metadata),
      nickname: params.nickname ?? null,
      product: params.product,
      recurring: params.recurring
        ? { ...params.recurring, meter: params.recurring.meter ?? null, trial_period_days: null }
        : null,
      tax_behavior: params.tax_behavior ?? "unspecified",
      ...(tiered && { tiers: params.tiers!.map(storedTier) }),
      tiers_mode: tiered ? params.tiers_mode! : null,
      transform_quantity: params.transform_quantity ?? null,
      type: params.recurring ? "recurring" : "one_time",
      unit_amount: tiered ? null : amount.whole,
      unit_amount_decimal: tiered ? null : amount.decimal,
    })
    fake.emit("price.created", price)
    return price
  }),
  route(
    "GET",
    "/v1/prices",
    z.strictObject({
      ...page,
      active: bool.optional(),
      currency: str.optional(),
      lookup_keys: z.array(str).max(10).optional(),
      product: str.optional(),
      type: z.enum(["one_time", "recurring"]).optional(),
      recurring: z
        .strictObject({ usage_type: str.optional(), interval: str.optional(), meter: str.optional() })
        .optional(),
    }),
    ({ fake, params }) => {
      const found = fake
        .all("price")
        .filter((one) => params.active === undefined || one.active === params.active)
        .filter((one) => !params.currency || one.currency === params.currency)
        .filter((one) => !params.product || one.product === params.product)
        .filter((one) => !params.type || one.type === params.type)
        .filter((one) => !params.lookup_keys || params.lookup_keys.includes(one.lookup_key ?? ""))
        .filter(
          (one) => !params.recurring?.usage_type || one.recurring?.usage_type === params.recurring.usage_type,
        )
        .filter((one) => !params.recurring?.interval || one.recurring?.interval === params.recurring.interval)
        .filter((one) => !params.recurring?.meter || one.recurring?.meter === params.recurring.meter)
      return pageOf(found, params, "/v1/prices")
    },
  ),
  route("GET", "/v1/prices/:id", z.strictObject({}), ({ fake, path }) => fake.get("price", path.id!)),
  route(
    "POST",
    "/v1/prices/:id",
    z.strictObject({
      active: bool.optional(),
      lookup_key: clearable.optional(),
      transfer_lookup_key: bool.optional(),
      metadata: metadata.optional(),
      nickname: clearable.optional(),
      tax_behavior: z.enum(["inclusive", "exclusive"]).optional(),
    }),
    ({ fake, params, path }) => {
      const price = fake.get("price", path.id!)
      const { metadata: change, lookup_key: key, transfer_lookup_key: transfer, ...rest } = params
      if (key === null) price.lookup_key = null
      else if (key) price.lookup_key = takeLookupKey(fake, key, transfer ?? false)
      Object.assign(price, rest, { metadata: mergeMetadata(price.metadata, change) })
      fake.emit("price.updated", price)
      return price
    },
  ),
]

function check(fake: Fake, params: z.output<typeof newPrice>): void {
  const product = fake.get("product", params.product, "product")
  if (!product.active) throw invalid("The product specified is inactive.", "product")
  if (params.billing_scheme === "tiered") {
    if (!params.tiers || !params.tiers_mode)
      throw invalid("Tiered prices need tiers and tiers_mode.", "tiers")
    if (params.tiers.at(-1)!.up_to !== null)
      throw invalid("The last tier must have up_to set to inf.", "tiers")
  } else if ((params.unit_amount === undefined) === (params.unit_amount_decimal === undefined)) {
    throw invalid("You must specify exactly one of unit_amount and unit_amount_decimal.", "unit_amount")
  }
  const { recurring } = params
  if (recurring?.usage_type === "metered") {
    if (!recurring.meter) throw invalid("Metered prices must be backed by a meter.", "recurring[meter]")
    fake.get("billing.meter", recurring.meter, "recurring[meter]")
  } else if (recurring?.meter) {
    throw invalid("Only metered prices can have a meter.", "recurring[meter]")
  }
}

function takeLookupKey(fake: Fake, key: string | undefined, transfer: boolean): string | null {
  if (!key) return null
  const holder = fake.all("price").find((one) => one.lookup_key === key)
  if (holder && !transfer) {
    throw invalid(`A price (\`${holder.id}\`) already uses that lookup key.`, "lookup_key")
  }
  if (holder) holder.lookup_key = null
  return key
}

function amountFields(whole: number | undefined, exact: string | undefined) {
  const text = exact ?? String(whole ?? 0)
  return { whole: /^\d+$/.test(text) ? Number(text) : null, decimal: text }
}

function storedTier(tier: z.output<typeof newTier>) {
  const flat = amountFields(tier.flat_amount, tier.flat_amount_decimal)
  const unit = amountFields(tier.unit_amount, tier.unit_amount_decimal)
  const hasFlat = tier.flat_amount !== undefined || tier.flat_amount_decimal !== undefined
  return {
    flat_amount: hasFlat ? flat.whole : null,
    flat_amount_decimal: hasFlat ? flat.decimal : null,
    unit_amount: unit.whole,
    unit_amount_decimal: unit.decimal,
    up_to: tier.up_to,
  } satisfies NonNullable<Objects["price"]["tiers"]>[number]
}
