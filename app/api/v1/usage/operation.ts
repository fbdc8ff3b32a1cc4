import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"
import { quotaOf, usageBy } from "@/lib/usage"

const day = z.iso.date()
const units = z.int().meta({ description: "Units charged", "x-unit": "1" })

export const usage = defineOperation({
  id: "usage",
  method: "GET",
  path: "/usage",
  tag: "Account",
  summary: "Calls and units by day, operation or key",
  description: "What the ledger holds, to the last acknowledged call. Days are UTC days.",
  access: { kind: "key", scope: "usage" },
  units: 0,
  request: z.strictObject({
    from: day.meta({ description: "First day, as 2026-12-01" }),
    to: day.meta({ description: "Last day, inclusive; at most 400 days after the first" }),
    by: z.enum(["day", "operation", "key"]).default("day"),
    mode: z.enum(["live", "sandbox"]).default("live"),
  }),
  response: z.object({
    data: z.array(
      z.object({
        group: z.string().meta({ description: "The day, the operation or the key's id" }),
        calls: z.int().meta({ description: "Calls that succeeded", "x-unit": "1" }),
        units,
      }),
    ),
    period: z.object({
      start: z.iso.datetime(),
      end: z.iso.datetime(),
      units,
      cap: z.int().meta({ description: "Units that the account may spend in the period", "x-unit": "1" }),
    }),
  }),
  example: {
    request: { from: "2026-12-01", to: "2026-12-31" },
    response: {
      data: [{ group: "2026-12-01", calls: 412, units: 640 }],
      period: {
        start: "2026-12-01T00:00:00.000Z",
        end: "2027-01-01T00:00:00.000Z",
        units: 640,
        cap: 50_000,
      },
    },
  },
  async run({ input, caller: { ctx } }) {
    const [data, quota] = await Promise.all([
      usageBy({ ctx, input }),
      quotaOf({ ctx, input: { mode: input.mode } }),
    ])
    return {
      data,
      period: {
        start: quota.period_start.toISOString(),
        end: quota.period_end.toISOString(),
        units: quota.used,
        cap: quota.cap,
      },
    }
  },
})
