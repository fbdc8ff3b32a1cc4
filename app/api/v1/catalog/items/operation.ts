import { z } from "zod"
import { listFields, listOf } from "@/app/api/v1/list-fields"
import { defineOperation } from "@/lib/api/define-operation"
import { createItem, listItems } from "@/lib/catalog"
import { pageOf, positionOf } from "@/lib/cursor"
import { exampleItem, itemFields, itemFrom, kind, showItemAs, shownItem } from "../shown-item"

const { id: _, created_at: __, updated_at: ___, ...sent } = exampleItem

export const listCatalogItems = defineOperation({
  id: "listCatalogItems",
  method: "GET",
  path: "/catalog/items",
  tag: "Catalogue",
  summary: "Your parts, newest first",
  access: { kind: "key", scope: "catalog" },
  units: 0,
  request: z.strictObject({ ...listFields, kind: kind.optional() }),
  response: listOf(shownItem),
  example: { request: {}, response: { data: [exampleItem], next_cursor: null } },
  async run({ input: { limit, cursor, kind }, caller: { ctx } }) {
    const list = `catalog:${kind ?? ""}`
    const before = cursor === undefined ? undefined : positionOf(ctx, list, cursor)
    const items = await listItems({ ctx, input: { limit: limit + 1, before, kind } })
    return pageOf(ctx, list, items.map(showItemAs), limit, ({ id }) => id)
  },
})

export const createCatalogItem = defineOperation({
  id: "createCatalogItem",
  method: "POST",
  path: "/catalog/items",
  tag: "Catalogue",
  summary: "Add a part",
  access: { kind: "key", scope: "catalog" },
  units: 0,
  status: 201,
  stores: true,
  request: z.strictObject({ kind, ...itemFields }),
  response: shownItem,
  problems: ["conflict"],
  example: { request: sent, response: exampleItem },
  async run({ input, caller: { ctx } }) {
    return showItemAs(await createItem({ ctx, input: itemFrom(input) }))
  },
})
