import { z } from "zod"
import { itemFields, itemFrom, kind, showItemAs } from "@/app/api/v1/catalog/shown-item"
import { wholeCatalog } from "@/app/portal/whole-catalog"
import { createItem } from "@/lib/catalog"
import { accountEndpoint } from "../../endpoint"
import { nothing } from "../../schemas"

export const GET = accountEndpoint({ right: "catalog.read", input: nothing, run: wholeCatalog })

export const POST = accountEndpoint({
  right: "catalog.manage",
  input: z.strictObject({ kind, ...itemFields }),
  run: async ({ ctx, input }) => showItemAs(await createItem({ ctx, input: itemFrom(input) })),
})
