import { type Trx, withTenant } from "@/db"
import type { Call, Ctx } from "@/lib/context"
import { TarnwrightError } from "@/lib/errors"
import { type Item, itemOf } from "./item"
import type { ItemKind } from "./kinds"

/** @throws TarnwrightError `not_found` when the account has no such item. */
export function showItem({ ctx, input }: Call<{ readonly item_id: string }>): Promise<Item> {
  return withTenant(ctx.account_id, (trx) => findItem(trx, ctx, input.item_id))
}

export async function findItem(trx: Trx, ctx: Ctx, item_id: string): Promise<Item> {
  const row = await trx
    .selectFrom("catalog_item")
    .selectAll()
    .where("account_id", "=", ctx.account_id)
    .where("id", "=", item_id)
    .executeTakeFirst()
  if (!row) throw new TarnwrightError("not_found", "There is no such item in this account.")
  return itemOf(row)
}

export interface ItemQuery {
  readonly limit: number
  /** Id of the last item of the page before; ids sort by the time they were made. */
  readonly before?: string | undefined
  readonly kind?: ItemKind | undefined
}

/** Items of the account's catalogue, newest first. */
export async function listItems({ ctx, input }: Call<ItemQuery>): Promise<Item[]> {
  const rows = await withTenant(ctx.account_id, (trx) => {
    let query = trx.selectFrom("catalog_item").selectAll().where("account_id", "=", ctx.account_id)
    if (input.kind) query = query.where("kind", "=", input.kind)
    if (input.before) query = query.where("id", "<", input.before)
    return query.orderBy("id", "desc").limit(input.limit).execute()
  })
  return rows.map(itemOf)
}
