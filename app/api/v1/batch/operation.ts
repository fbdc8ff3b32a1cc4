import { z } from "zod"
import { defineOperation } from "@/lib/api/define-operation"

const largestBatch = 100

export const batch = defineOperation({
  id: "batch",
  method: "POST",
  path: "/batch",
  tag: "Batch",
  summary: "Up to 100 calculations in one call",
  description:
    "Each item is validated, metered and refused as if it had come alone, so one failure fails only itself. Units are " +
    "the sum of the items that succeeded. Where the units of the period run out in the middle, the rest is refused.",
  units: 0,
  request: z.strictObject({
    calls: z
      .array(
        z.strictObject({
          id: z.string().min(1).max(64).meta({ description: "Your name for the item" }),
          path: z
            .string()
            .startsWith("/")
            .meta({ description: "Path of a calculation, as `/carbonate/co2`" }),
          body: z.unknown().meta({ description: "Body of the calculation" }),
        }),
      )
      .min(1)
      .max(largestBatch),
  }),
  response: z.object({
    results: z.array(
      z.object({
        id: z.string(),
        status: z.int().meta({ description: "HTTP status of the item", "x-unit": "1" }),
        body: z.unknown().meta({ description: "Answer or problem of the item" }),
      }),
    ),
  }),
  example: {
    request: { calls: [{ id: "a", path: "/carbonate/co2", body: { ph: 6.8 } }] },
    response: {
      results: [
        {
          id: "a",
          status: 422,
          body: {
            type: "https://tarnwright.example/docs/errors/validation_failed",
            title: "The input is not valid",
            status: 422,
            detail: "/kh_dkh: This field is missing. Send a number.",
            instance: "req_01kbc0x7qzf0ra2w6v8n4m3h5t",
            code: "validation_failed",
            errors: [{ pointer: "/kh_dkh", detail: "This field is missing. Send a number." }],
          },
        },
      ],
    },
  },
  async run({ input, caller }) {
    const answers = await caller.perform(input.calls)
    return { results: answers.map((answer, index) => ({ id: input.calls[index]?.id ?? "", ...answer })) }
  },
})
