import { showItemAs } from "@/app/api/v1/catalog/shown-item"
import { listItems } from "@/lib/catalog"
import type { Ctx } from "@/lib/context"

/** More parts than a shop has on its shelves; the page filters and sorts them all in the browser. */
const mostShown = 5_000

/** The parts of an account as its page shows them, newest first. */
export async function wholeCatalog({ ctx }: { ctx: Ctx }) {
  return (await listItems({ ctx, input: { limit: mostShown } })).map(showItemAs)
}
