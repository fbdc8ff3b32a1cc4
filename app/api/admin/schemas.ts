import { z } from "zod"

export const keySearchInput = z.strictObject({
  text: z
    .string()
    .trim()
    .regex(/^(key_\w{20,40}|[0-9A-Za-z]{4})$/, "Write the id of a key (key_…) or its last four characters."),
})

export const adminRevocationInput = z.strictObject({
  key_id: z.string(),
  reason: z
    .string()
    .trim()
    .min(8, "Say why in a sentence: the owners read it.")
    .max(200, "Use at most 200 characters."),
})
