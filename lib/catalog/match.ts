import type { Call } from "@/lib/context"
import type { CatalogMatch } from "@/lib/plan/match"
import type { PlanInput } from "@/lib/plan/plan-input"
import { systemPlan } from "@/lib/plan/system-plan"
import { listItems } from "./find"
import type { Item } from "./item"
import { mostItems, planItem } from "./plan-items"

/** A part of the account that fits, with what the account sells it for and the numbers it goes by. */
export interface ItemMatch extends CatalogMatch {
  readonly item: Item
}

/**
 * The account's own parts that fit a tank, best first within their kind, each with its reason and margin.
 *
 * Throws `OutOfDomain` when the plan itself cannot be.
 */
export async function matchItems({ ctx, input }: Call<PlanInput>): Promise<ItemMatch[]> {
  const items = await listItems({ ctx, input: { limit: mostItems } })
  const catalog = items.flatMap((item) => planItem(item) ?? [])
  const byId = new Map(items.map((item) => [item.id, item]))
  const { result } = systemPlan({ ...input, catalog })
  return result.catalog_matches.map((match) => ({ ...match, item: byId.get(match.item_id)! }))
}
