import { z } from "zod"
import { describeAccount } from "@/lib/accounts"
import { defineOperation } from "@/lib/api/define-operation"

export const account = defineOperation({
  id: "account",
  method: "GET",
  path: "/account",
  tag: "Account",
  summary: "The account of your key",
  access: { kind: "key", scope: "usage" },
  units: 0,
  request: z.strictObject({}),
  response: z.object({
    id: z.string(),
    slug: z.string(),
    name: z.string(),
    plan: z.string(),
    status: z.enum(["active", "suspended", "closing"]),
    unit_cap: z.int().meta({ description: "Units that the account may spend in a period", "x-unit": "1" }),
    overage_cap_minor: z.int().meta({
      description: "Most that the owner allows beyond the plan in a period, in US cents",
      "x-unit": "1",
    }),
    created_at: z.iso.datetime(),
  }),
  example: {
    request: {},
    response: {
      id: "acct_01kbc0x7qzf0ra2w6v8n4m3h5t",
      slug: "fernhollow",
      name: "Fernhollow Aquatics",
      plan: "brand",
      status: "active",
      unit_cap: 500_000,
      overage_cap_minor: 0,
      created_at: "2026-12-01T09:00:00.000Z",
    },
  },
  async run({ caller: { ctx } }) {
    const { created_at, ...described } = await describeAccount({ ctx })
    return { ...described, created_at: created_at.toISOString() }
  },
})
