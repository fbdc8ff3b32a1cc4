import { z } from "zod"
import { quantity } from "@/lib/api/quantity"
import { attributesOf, type Item, type ItemAttributes, itemKindNames } from "@/lib/catalog"

export const itemId = z.string().max(64).meta({ description: "Id of the item" })
export const kind = z.enum(itemKindNames).meta({ id: "ItemKind", description: "What the item is" })

const numbers = Object.fromEntries(
  itemKindNames.flatMap((name) =>
    attributesOf(name).map((attribute) => [attribute.name, quantity(attribute.quantity).optional()] as const),
  ),
)

/** The numbers of every kind; the verb says which a kind has and which it needs. */
const attributes = z
  .strictObject({
    ...numbers,
    method: z
      .enum(["diffuser", "inline_diffuser"])
      .optional()
      .meta({ description: "Where a diffuser stands" }),
    pump_curve: z
      .array(z.strictObject({ flow_l_h: quantity("flow_l_h"), head_m: quantity("head_m") }))
      .optional()
      .meta({ description: "Points of a filter's measured curve, in place of its two advertised numbers" }),
  })
  .meta({
    id: "ItemAttributes",
    description: "Numbers of the item; which ones depends on its kind",
  }) as unknown as z.ZodType<ItemAttributes, ItemAttributes>

const price = z.union([
  z.strictObject({
    amount_minor: z
      .int()
      .min(0)
      .max(100_000_000)
      .meta({ description: "In the currency's smallest unit", "x-unit": "1" }),
    currency: z.string().length(3).meta({ description: "Three letters, as USD" }),
  }),
  z.null(),
])

const fields = {
  name: z.string().min(1).max(160),
  sku: z.union([z.string().min(1).max(80), z.null()]).meta({ description: "Your own number, unique" }),
  url: z.union([z.url().max(500), z.null()]).meta({ description: "Its page in your shop" }),
  price,
  attributes,
}

/** What of a new item a caller sends. */
export const itemFields = {
  ...fields,
  sku: fields.sku.default(null),
  url: fields.url.default(null),
  price: fields.price.default(null),
  attributes: fields.attributes.default({}),
}

/** What of an item a caller may change. */
export const itemChanges = {
  name: fields.name.optional(),
  sku: fields.sku.optional(),
  url: fields.url.optional(),
  price: fields.price.optional(),
  attributes: fields.attributes.optional(),
}

export const shownItem = z
  .object({
    id: itemId,
    kind,
    name: z.string(),
    sku: z.union([z.string(), z.null()]),
    url: z.union([z.string(), z.null()]),
    price,
    attributes,
    created_at: z.iso.datetime(),
    updated_at: z.iso.datetime(),
  })
  .meta({ id: "CatalogItem", description: "A part that you sell" })

/** The verb's price columns in place of the wire's price. */
export function itemFrom<Fields extends { price?: z.output<typeof price> | undefined }>({
  price,
  ...rest
}: Fields) {
  if (price === undefined) return rest
  return { ...rest, price_minor: price?.amount_minor ?? null, currency: price?.currency ?? null }
}

export function showItemAs({
  price_minor,
  currency,
  created_at,
  updated_at,
  ...item
}: Item): z.output<typeof shownItem> {
  return {
    ...item,
    price: price_minor === null || currency === null ? null : { amount_minor: price_minor, currency },
    created_at: created_at.toISOString(),
    updated_at: updated_at.toISOString(),
  }
}

export const exampleItem = {
  id: "item_01kbc0x7qzf0ra2w6v8n4m3h5t",
  kind: "filter" as const,
  name: "Fernhollow canister 1000",
  sku: "FH-C-1000",
  url: "https://fernhollow.example/parts/canister-1000",
  price: { amount_minor: 18_900, currency: "USD" },
  attributes: { max_flow_l_h: 1000, max_head_m: 1.6, hose_inner_diameter_mm: 16 },
  created_at: "2026-12-01T09:00:00.000Z",
  updated_at: "2026-12-01T09:00:00.000Z",
}
