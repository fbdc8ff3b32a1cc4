import { invalid, missing } from "./errors"
import { inRange } from "./params"

interface PageParams {
  limit: number
  starting_after?: string | undefined
  ending_before?: string | undefined
  created?: Parameters<typeof inRange>[1]
}

/**
 * One page of a list, newest first.
 *
 * @param items oldest first, as they are stored
 * @throws ApiError 400 for a cursor that is not in the list
 */
export function page<Item extends { id: string; created?: number }>(
  items: Item[],
  params: PageParams,
  url: string,
): { object: "list"; data: Item[]; has_more: boolean; url: string } {
  const wanted = items.filter((item) => inRange(item.created ?? 0, params.created)).reverse()
  const { starting_after: after, ending_before: before, limit } = params
  if (after && before)
    throw invalid("You can pass either starting_after or ending_before, not both.", "ending_before")
  if (before) {
    const end = indexOf(wanted, before, "ending_before")
    const start = Math.max(0, end - limit)
    return { object: "list", data: wanted.slice(start, end), has_more: start > 0, url }
  }
  const start = after ? indexOf(wanted, after, "starting_after") + 1 : 0
  return {
    object: "list",
    data: wanted.slice(start, start + limit),
    has_more: wanted.length > start + limit,
    url,
  }
}

function indexOf(items: { id: string }[], id: string, param: string): number {
  const index = items.findIndex((item) => item.id === id)
  if (index < 0) throw missing("object", id, param)
  return index
}
