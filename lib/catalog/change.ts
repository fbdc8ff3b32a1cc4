import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { columnsOf, requireFreeSku } from "./create"
import { findItem } from "./find"
import { type Item, itemOf, type NewItem, requireFit } from "./item"

/** What of an item changes; its kind stays. What is left out stays as it is, `attributes` are replaced whole. */
export type ItemChange = { readonly item_id: string } & Partial<Omit<NewItem, "kind">>

/**
 * Changes an item.
 *
 * @throws TarnwrightError `not_found`, `validation_failed`, `conflict` when the new sku is taken.
 */
export function changeItem({ ctx, input }: Call<ItemChange>): Promise<Item> {
  const { item_id, ...change } = input
  return withTenant(ctx.account_id, async (trx) => {
    const before = await findItem(trx, ctx, item_id)
    const after = { ...before, ...change }
    requireFit(after)
    if (after.sku && after.sku !== before.sku) await requireFreeSku(trx, ctx, after.sku, item_id)
    const row = await trx
      .updateTable("catalog_item")
      .set({ ...columnsOf(after), updated_at: ctx.now })
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", item_id)
      .returningAll()
      .executeTakeFirstOrThrow()
    await recordAct(trx, ctx, {
      action: "catalog.item_changed",
      target: item_id,
      detail: { fields: Object.keys(change) },
    })
    return itemOf(row)
  })
}

/** Takes an item out of the catalogue. @throws TarnwrightError `not_found`. */
export function deleteItem({ ctx, input }: Call<{ readonly item_id: string }>): Promise<void> {
  return withTenant(ctx.account_id, async (trx) => {
    const item = await findItem(trx, ctx, input.item_id)
    await trx
      .deleteFrom("catalog_item")
      .where("account_id", "=", ctx.account_id)
      .where("id", "=", item.id)
      .execute()
    await recordAct(trx, ctx, {
      action: "catalog.item_deleted",
      target: item.id,
      detail: { name: item.name },
    })
  })
}
