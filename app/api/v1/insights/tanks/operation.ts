import { z } from "zod"
import { levelName, methodName, verdictName } from "@/app/api/v1/widgets/[widget_id]/tank-fields"
import { defineOperation } from "@/lib/api/define-operation"
import { figure, figureOrNull } from "@/lib/api/quantity"
import { tankInsights } from "@/lib/insights"

const day = z.iso.date()
const longest_days = 400
const tanks = z.int().meta({ description: "Tanks, in steps of five", "x-unit": "1" })

function distributionOf<Bucket extends z.ZodType>(bucket: Bucket, description: string) {
  return z.object({ tanks, buckets: z.array(bucket) }).meta({ description })
}

function ranges(name: "volume_l" | "kh_dkh", description: string) {
  return distributionOf(z.object({ from: figure(name), below: figureOrNull(name), tanks }), description)
}

function names<Name extends z.ZodType>(name: Name, description: string) {
  return distributionOf(z.object({ name, tanks }), description)
}

export const tankInsightsOperation = defineOperation({
  id: "tankInsights",
  method: "GET",
  path: "/insights/tanks",
  tag: "Insights",
  summary: "What your customers' tanks look like",
  description:
    "Distributions over the tanks that your widgets were asked about. Never a person: counts stand in steps of five, " +
    "a bucket that holds fewer is left out, and the totals are of what is shown.",
  access: { kind: "key", scope: "insights" },
  units: 0,
  request: z
    .strictObject({
      from: day.meta({ description: "First day, as 2026-12-01" }),
      to: day.meta({ description: `Last day, inclusive; at most ${longest_days} days after the first` }),
    })
    .refine(({ from, to }) => from <= to && Date.parse(to) - Date.parse(from) <= longest_days * 86_400_000, {
      path: ["to"],
      message: `Choose a day from \`from\` on, at most ${longest_days} days after it.`,
    }),
  response: z.object({
    volume_l: ranges("volume_l", "By volume; the last bucket has no upper end"),
    kh_dkh: ranges("kh_dkh", "By carbonate hardness"),
    method: names(methodName, "By the way the gas gets in"),
    level: names(levelName, "By how their CO2 was judged"),
    verdict: names(verdictName, "By how the reactor on their return line was judged"),
  }),
  example: {
    request: { from: "2026-12-01", to: "2026-12-31" },
    response: {
      volume_l: { tanks: 155, buckets: [{ from: 150, below: 200, tanks: 155 }] },
      kh_dkh: {
        tanks: 260,
        buckets: [
          { from: 2, below: 4, tanks: 90 },
          { from: 4, below: 6, tanks: 170 },
        ],
      },
      method: { tanks: 120, buckets: [{ name: "inline_reactor", tanks: 120 }] },
      level: { tanks: 255, buckets: [{ name: "in_range", tanks: 255 }] },
      verdict: { tanks: 60, buckets: [{ name: "suitable", tanks: 60 }] },
    },
  },
  run({ input, caller: { ctx } }) {
    return tankInsights({ ctx, input })
  },
})
