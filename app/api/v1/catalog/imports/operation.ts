import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { CSV_LIMIT_BYTES, csvColumns, importItems } from "@/lib/catalog"

const flag = z
  .enum(["true", "false"])
  .default("false")
  .transform((text) => text === "true")
const count = (description: string) => z.int().meta({ description, "x-unit": "1" })

export const importCatalog = defineOperation({
  id: "importCatalog",
  method: "POST",
  path: "/catalog/imports",
  tag: "Catalogue",
  summary: "Take a CSV file into your catalogue",
  description:
    `Columns: ${csvColumns.map((column) => `\`${column}\``).join(", ")}. A row whose sku is known changes that part, ` +
    "any other row adds one. Nothing is taken when a row is bad, unless `partial=true`. A pump's curve is written as " +
    "`0:1.6;500:1.2;1000:0` (flow in L/h : head in m). At most 5,000 rows and 5 MiB.",
  access: { kind: "key", scope: "catalog" },
  units: 0,
  stores: true,
  csv: { limit_bytes: CSV_LIMIT_BYTES },
  request: z.strictObject({
    csv: z.string().meta({ description: "The file" }),
    dry_run: flag.meta({ description: "Only say what would happen" }),
    partial: flag.meta({ description: "Take the good rows even if others are bad" }),
  }),
  response: z.object({
    rows: count("Rows read"),
    created: count("Parts added, or to be added"),
    changed: count("Parts changed, or to be changed"),
    imported: z.boolean().meta({ description: "Whether anything was taken" }),
    errors: z.array(
      z.object({
        row: count("As a spreadsheet counts: the header is row 1"),
        column: z.string(),
        detail: z.string(),
      }),
    ),
  }),
  example: {
    request: {
      csv: "kind,name,sku,max_flow_l_h,max_head_m\nfilter,Fernhollow canister 1000,FH-C-1000,1000,1.6\n",
      dry_run: "true",
    },
    response: { rows: 1, created: 1, changed: 0, imported: false, errors: [] },
  },
  async run({ input, caller: { ctx } }) {
    const { good: _, errors, ...outcome } = await importItems({ ctx, input })
    return { ...outcome, errors: errors.map(({ row, column, detail }) => ({ row, column, detail })) }
  },
})
