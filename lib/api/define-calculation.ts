import { z } from "zod"
import type { Answer } from "@/lib/chemistry/answer"
import { roundSignificant } from "@/lib/units/figures"
import { type Caller, defineOperation, type Operation } from "./define-operation"
import type { Tag } from "./tags"

const caution = z
  .object({ code: z.string(), severity: z.enum(["info", "warning", "danger"]), message: z.string() })
  .meta({ id: "Caution", description: "Something to show beside the result" })

const assumption = z
  .object({ code: z.string(), message: z.string() })
  .meta({ id: "Assumption", description: "What the calculation took for granted" })

const method = z
  .object({
    name: z.string(),
    version: z.string().meta({ description: "Version of the engine" }),
    sources: z.array(
      z
        .object({ title: z.string(), year: z.int().meta({ "x-unit": "a" }), detail: z.string() })
        .meta({ id: "Source" }),
    ),
  })
  .meta({ id: "Method", description: "How the result was found, with its sources" })

interface Calculation<
  Request extends z.ZodType,
  Result extends z.ZodRawShape,
  Uncertainty extends z.ZodRawShape,
> {
  id: string
  path: string
  tag: Tag
  summary: string
  description?: string
  units: number
  request: Request
  result: Result
  uncertainty: Uncertainty
  example: z.input<Request>
  run(input: z.output<Request>, caller: Caller): Answer<object, object> | Promise<Answer<object, object>>
}

/** Declares a calculation: a POST on the engine, answered by result, uncertainty, cautions, assumptions, method. */
export function defineCalculation<
  Request extends z.ZodType,
  Result extends z.ZodRawShape,
  Uncertainty extends z.ZodRawShape,
>(calculation: Calculation<Request, Result, Uncertainty>): Operation {
  const { result, uncertainty, example, run, ...rest } = calculation
  const response = z.object({
    result: z.object(result),
    uncertainty: z.object(uncertainty),
    cautions: z.array(caution),
    assumptions: z.array(assumption),
    method,
    input: z.record(z.string(), z.unknown()).meta({ description: "Your input with its defaults filled in" }),
  })
  return defineOperation({
    ...rest,
    method: "POST",
    problems: ["out_of_domain"],
    response,
    example: { request: example, response: "computed" },
    run({ input, caller }) {
      const shown = ({ result, uncertainty, cautions, assumptions, method }: Answer<object, object>) =>
        ({
          result: rounded(result),
          uncertainty: rounded(uncertainty),
          cautions,
          assumptions,
          method,
          input,
        }) as unknown as z.output<typeof response>
      const answer = run(input, caller)
      // The engine answers at once; only what looks something up first has to be waited for.
      return answer instanceof Promise ? answer.then(shown) : shown(answer)
    },
  }) as unknown as Operation
}

/** The value with each number rounded to 6 significant digits, as the contract promises. */
export function rounded(value: unknown): unknown {
  if (typeof value === "number") return roundSignificant(value)
  if (Array.isArray(value)) return value.map(rounded)
  if (typeof value === "object" && value !== null) {
    const copy: Record<string, unknown> = {}
    for (const name in value) copy[name] = rounded((value as Record<string, unknown>)[name])
    return copy
  }
  return value
}
