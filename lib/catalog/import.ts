import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { columnsOf, insertItem } from "./create"
import { type RowError, readCsv } from "./csv"

export interface Import {
  readonly csv: string
  /** Only say what would happen. */
  readonly dry_run: boolean
  /** Take the good rows even if others are bad. */
  readonly partial: boolean
}

export interface ImportOutcome {
  readonly rows: number
  readonly created: number
  readonly changed: number
  readonly errors: RowError[]
  /** False on a dry run, and when a bad row held all back. */
  readonly imported: boolean
}

/**
 * Takes a CSV file into the catalogue: a row whose sku is known changes that item, any other row makes one. Nothing is
 * taken when a row is bad, unless `partial` says so.
 *
 * @throws TarnwrightError `validation_failed` when the file is not such a CSV at all.
 */
export function importItems({ ctx, input }: Call<Import>): Promise<ImportOutcome> {
  const { items, errors } = readCsv(input.csv)
  const imported = !input.dry_run && (errors.length === 0 || input.partial)
  return withTenant(ctx.account_id, async (trx) => {
    const known = await trx
      .selectFrom("catalog_item")
      .select(["id", "sku"])
      .where("account_id", "=", ctx.account_id)
      .where("sku", "is not", null)
      .execute()
    const idOfSku = new Map(known.map(({ id, sku }) => [sku, id]))
    let created = 0
    let changed = 0
    for (const { item } of items) {
      const id = item.sku ? idOfSku.get(item.sku) : undefined
      if (id) changed++
      else created++
      if (!imported) continue
      if (id) {
        await trx
          .updateTable("catalog_item")
          .set({ ...columnsOf(item), kind: item.kind, updated_at: ctx.now })
          .where("account_id", "=", ctx.account_id)
          .where("id", "=", id)
          .execute()
      } else {
        await insertItem(trx, ctx, item)
      }
    }
    if (imported) await recordAct(trx, ctx, { action: "catalog.imported", detail: { created, changed } })
    const bad = new Set(errors.map(({ row }) => row)).size
    return { rows: items.length + bad, created, changed, errors, imported }
  })
}
