import { z } from "zod"
import type { Caller } from "@/lib/api/define-operation"
import { createReport, type Report, type ReportAnswer, reportKindNames } from "@/lib/reports"
import { calculations } from "./calculations"
import { shopper, title } from "./shown-report"

const forms = reportKindNames.map((kind) =>
  z.strictObject({
    kind: z.literal(kind),
    input: calculations[kind].request.meta({
      description: `Body of \`POST ${calculations[kind].path}\``,
    }),
    title: title.optional(),
    shopper: shopper.optional(),
  }),
)

/** What to calculate and keep: the input of a kind is the body of its calculation. */
export const newReport = z.discriminatedUnion("kind", forms as [(typeof forms)[0], ...typeof forms])

/** Units of a report, its calculation among them. */
export const REPORT_UNITS = 10

/** Calculates and keeps; metered by `charge`, as one with what is stored. */
export async function keepReport(
  asked: z.output<typeof newReport>,
  caller: Pick<Caller, "ctx" | "charge">,
): Promise<Report> {
  const { kind, input, title, shopper } = asked
  const answer = (await calculations[kind].run({ input, caller: caller as Caller })) as unknown as ReportAnswer
  return createReport({
    ctx: caller.ctx,
    input: { kind, title, shopper, input: input as object, answer, charge: () => caller.charge() },
  })
}
