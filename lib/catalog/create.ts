import { type Trx, withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { newId } from "@/lib/id"
import { type Item, itemOf, type NewItem, requireFit } from "./item"

/**
 * Puts an item into the account's catalogue.
 *
 * @throws TarnwrightError `validation_failed` with all that is wrong; `conflict` when the sku is taken.
 */
export function createItem({ ctx, input }: Call<NewItem>): Promise<Item> {
  requireFit(input)
  return withTenant(ctx.account_id, async (trx) => {
    if (input.sku) await requireFreeSku(trx, ctx, input.sku)
    const item = await insertItem(trx, ctx, input)
    await recordAct(trx, ctx, {
      action: "catalog.item_created",
      target: item.id,
      detail: { name: item.name },
    })
    return item
  })
}

async function insertItem(trx: Trx, ctx: Ctx, input: NewItem): Promise<Item> {
  const row = await trx
    .insertInto("catalog_item")
    .values(rowOf(ctx, input))
    .returningAll()
    .executeTakeFirstOrThrow()
  return itemOf(row)
}

/** PostgreSQL takes 65,535 parameters a statement, an item has ten. */
const itemsPerStatement = 1_000

export async function insertItems(trx: Trx, ctx: Ctx, inputs: readonly NewItem[]): Promise<void> {
  for (let from = 0; from < inputs.length; from += itemsPerStatement) {
    const rows = inputs.slice(from, from + itemsPerStatement).map((input) => rowOf(ctx, input))
    await trx.insertInto("catalog_item").values(rows).execute()
  }
}

function rowOf(ctx: Ctx, input: NewItem) {
  return {
    account_id: ctx.account_id,
    id: newId("catalog_item"),
    ...columnsOf(input),
    kind: input.kind,
    created_at: ctx.now,
    updated_at: ctx.now,
  }
}

/** The columns that an item's own fields fill. */
export function columnsOf({ name, sku, url, price_minor, currency, attributes }: NewItem) {
  return {
    name: name.trim(),
    sku: sku || null,
    url: url || null,
    price_minor: price_minor ?? null,
    currency: currency || null,
    attributes: JSON.stringify(attributes),
  }
}

export async function requireFreeSku(trx: Trx, ctx: Ctx, sku: string, except?: string): Promise<void> {
  const taken = await trx
    .selectFrom("catalog_item")
    .select("id")
    .where("account_id", "=", ctx.account_id)
    .where("sku", "=", sku)
    .executeTakeFirst()
  if (taken && taken.id !== except) {
    const detail = `The sku ${sku} belongs to ${taken.id}. Change that item, or give this one another sku.`
    throw new TarnwrightError("conflict", detail, { errors: [{ pointer: "/sku", detail }] })
  }
}
