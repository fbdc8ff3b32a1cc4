import { z } from "zod"
import { itemChanges, itemFrom, itemId, showItemAs } from "@/app/api/v1/catalog/shown-item"
import { changeItem, deleteItem } from "@/lib/catalog"
import { accountEndpoint } from "../../../endpoint"

export const PATCH = accountEndpoint({
  right: "catalog.manage",
  input: z.strictObject({ item_id: itemId, ...itemChanges }),
  run: async ({ ctx, input: { item_id, ...change } }) =>
    showItemAs(await changeItem({ ctx, input: { item_id, ...itemFrom(change) } })),
})

export const DELETE = accountEndpoint({
  right: "catalog.manage",
  input: z.strictObject({ item_id: itemId }),
  run: deleteItem,
})
