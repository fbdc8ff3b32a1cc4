import { withTenant } from "@/db"
import { recordAct } from "@/lib/audit"
import type { Call } from "@/lib/context"
import { columnsOf, insertItems } from "./create"
import { type RowError, readCsv } from "./csv"
import type { ItemKind } from "./kinds"

export interface Import {
  readonly csv: string
  /** Only say what would happen. */
  readonly dry_run: boolean
  /** Take the good rows even if others are bad. */
  readonly partial: boolean
}

/** What becomes of a good row. */
export interface ImportedRow {
  readonly row: number
  readonly kind: ItemKind
  readonly name: string
  readonly sku: string | null
  /** Whether it changes an item that is there. */
  readonly changes: boolean
}

export interface ImportOutcome {
  readonly rows: number
  readonly created: number
  readonly changed: number
  readonly good: ImportedRow[]
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
    const knownId = ({ item }: (typeof items)[number]) => (item.sku ? idOfSku.get(item.sku) : undefined)
    const fresh = items.filter((each) => !knownId(each))
    const old = items.filter(knownId)
    const [created, changed] = [fresh.length, old.length]
    if (imported) {
      await insertItems(
        trx,
        ctx,
        fresh.map(({ item }) => item),
      )
      for (const each of old) {
        await trx
          .updateTable("catalog_item")
          .set({ ...columnsOf(each.item), kind: each.item.kind, updated_at: ctx.now })
          .where("account_id", "=", ctx.account_id)
          .where("id", "=", knownId(each)!)
          .execute()
      }
    }
    if (imported) await recordAct(trx, ctx, { action: "catalog.imported", detail: { created, changed } })
    const bad = new Set(errors.map(({ row }) => row)).size
    const good = items.map((each) => {
      const { kind, name, sku } = each.item
      return {
        row: each.row,
        kind,
        name: name.trim(),
        sku: sku ?? null,
        changes: knownId(each) !== undefined,
      }
    })
    return { rows: items.length + bad, created, changed, good, errors, imported }
  })
}
