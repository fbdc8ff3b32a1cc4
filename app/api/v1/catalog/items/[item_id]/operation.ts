import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { changeItem, deleteItem, showItem } from "@/lib/catalog"
import { exampleItem, itemChanges, itemFrom, itemId, showItemAs, shownItem } from "../../shown-item"

const shared = {
  path: "/catalog/items/{item_id}",
  tag: "Catalogue",
  access: { kind: "key", scope: "catalog" },
  units: 0,
} as const

export const readCatalogItem = defineOperation({
  ...shared,
  id: "readCatalogItem",
  method: "GET",
  summary: "A part",
  request: z.strictObject({ item_id: itemId }),
  response: shownItem,
  example: { request: { item_id: exampleItem.id }, response: exampleItem },
  async run({ input, caller: { ctx } }) {
    return showItemAs(await showItem({ ctx, input }))
  },
})

export const changeCatalogItem = defineOperation({
  ...shared,
  id: "changeCatalogItem",
  method: "PATCH",
  summary: "Change a part",
  description: "What you leave out stays; `attributes` are replaced whole. A part keeps its kind.",
  request: z.strictObject({ item_id: itemId, ...itemChanges }),
  response: shownItem,
  problems: ["conflict"],
  example: {
    request: { item_id: exampleItem.id, price: { amount_minor: 17_500, currency: "USD" } },
    response: { ...exampleItem, price: { amount_minor: 17_500, currency: "USD" } },
  },
  async run({ input: { item_id, ...change }, caller: { ctx } }) {
    return showItemAs(await changeItem({ ctx, input: { item_id, ...itemFrom(change) } }))
  },
})

export const deleteCatalogItem = defineOperation({
  ...shared,
  id: "deleteCatalogItem",
  method: "DELETE",
  status: 204,
  summary: "Take a part out",
  request: z.strictObject({ item_id: itemId }),
  response: z.undefined(),
  example: { request: { item_id: exampleItem.id }, response: undefined },
  async run({ input, caller: { ctx } }) {
    await deleteItem({ ctx, input })
    return undefined
  },
})
