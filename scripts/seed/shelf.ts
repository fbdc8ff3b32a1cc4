import { readFileSync } from "node:fs"
import { importItems, listItems } from "@/lib/catalog"
import type { Ctx } from "@/lib/context"

/** Fills the shelf of the demo shop with invented parts. Does nothing for an account that has some. */
export async function fillShelf(ctx: Ctx): Promise<void> {
  const known = await listItems({ ctx, input: { limit: 1 } })
  if (known.length > 0) return
  const csv = readFileSync(new URL("shelf.csv", import.meta.url), "utf8")
  const { errors } = await importItems({ ctx, input: { csv, dry_run: false, partial: false } })
  if (errors.length > 0) throw new Error(`The demo shelf is wrong: ${JSON.stringify(errors)}`)
}
