import { z } from "zod"

/** What every list takes. */
export const listFields = {
  limit: z.coerce
    .number()
    .int()
    .min(1)
    .max(100)
    .default(20)
    .meta({ description: "Most items of a page", "x-unit": "1" }),
  cursor: z
    .string()
    .max(500)
    .optional()
    .meta({ description: "`next_cursor` of the page before; absent for the first page" }),
}

/** What every list answers. */
export function listOf<Item extends z.ZodType>(item: Item) {
  return z.object({
    data: z.array(item),
    next_cursor: z.string().nullable().meta({ description: "For the next page; null on the last" }),
  })
}
