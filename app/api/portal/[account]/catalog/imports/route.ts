import { z } from "zod"
import { CSV_LIMIT_BYTES, importItems } from "@/lib/catalog"
import { accountEndpoint } from "../../../endpoint"

/** A CSV file into the catalogue. It is taken whole or not at all, also when the page is left meanwhile. */
export const POST = accountEndpoint({
  right: "catalog.manage",
  input: z.strictObject({ csv: z.string().max(CSV_LIMIT_BYTES), dry_run: z.boolean(), partial: z.boolean() }),
  // Quotes and line ends grow when the file is put into JSON.
  limit_bytes: 2 * CSV_LIMIT_BYTES,
  run: importItems,
})
