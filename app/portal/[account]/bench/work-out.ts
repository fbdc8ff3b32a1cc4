import { z } from "zod"
import { planFields } from "@/app/api/v1/plan/plan-fields"
import type { Answer } from "@/lib/chemistry/answer"
import { type Co2Result, type Co2Uncertainty, co2FromPh } from "@/lib/chemistry/co2-from-ph"
import type { ElementInput } from "@/lib/flow/elements"
import type { PlanInput } from "@/lib/plan/plan-input"
import { type PlanUncertainty, type SystemPlan, systemPlan } from "@/lib/plan/system-plan"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { activeFields, type BenchForm, type FieldName, fieldOf } from "./fields"
import { type FieldValue, isUnusable, readField, type Sheet } from "./sheet"

/** The body that `POST /api/v1/plan` takes: the Bench asks its own engine exactly what a shop's site would ask ours. */
const planRequest = z.strictObject(planFields)
export type PlanRequest = z.input<typeof planRequest>

export interface Worked {
  readonly request: PlanRequest
  readonly input: PlanInput
  readonly plan: Answer<SystemPlan, PlanUncertainty>
  /** CO2 by the pH that was read, where one was. */
  readonly now: (Answer<Co2Result, Co2Uncertainty> & { readonly ph: number }) | undefined
}

/** What is wrong, by the field to mend; what concerns no single field stands at `sheet`. */
export type Problems = Partial<Record<FieldName | "sheet", string>>

export type Outcome =
  | { readonly worked: Worked; readonly problems?: undefined }
  | { readonly worked?: undefined; readonly problems: Problems }

/** A sheet worked out by the engine, or what has to be mended before it can be. */
export function workOut(sheet: Sheet): Outcome {
  const names = activeFields(sheet.form)
  const read = sheetSchema(names).safeParse(sheet)
  if (!read.success) return { problems: problemsOf(read.error, names) }
  const { ph, ...values } = read.data
  const request = requestOf(values, sheet.form)
  const parsed = planRequest.safeParse(request)
  if (!parsed.success) return { problems: problemsOf(parsed.error, names) }
  const input = parsed.data
  const readings = typeof ph === "number" ? { ...input, ph } : undefined
  try {
    const now = readings && { ...co2FromPh(readings), ph: readings.ph }
    return { worked: { request, input, plan: systemPlan(input), now } }
  } catch (error) {
    if (!(error instanceof OutOfDomain)) throw error
    return { problems: { [fieldAt(error.field, names)]: error.detail } }
  }
}

/** Reads the fields that count, each with what is wrong with it. */
function sheetSchema(names: readonly FieldName[]) {
  return z.custom<Sheet>().transform((sheet, ctx) => {
    const values: Partial<Record<FieldName, FieldValue>> = {}
    for (const name of names) {
      const value = readField(sheet, name)
      if (isUnusable(value)) ctx.addIssue({ code: "custom", path: [name], message: value.problem })
      else values[name] = value
    }
    return values
  })
}

/** The form's values as the input of a plan: each at its path, the fittings counted into the list of elements. */
export function requestOf(values: Partial<Record<FieldName, FieldValue>>, form: BenchForm): PlanRequest {
  const tree: Record<string, unknown> = {
    agitation: form.agitation,
    ph_error: Number(form.ph_error),
    kh_error_dkh: Number(form.kh_error_dkh),
    plant_demand: form.plant_demand,
    clean_media_fraction: Number(form.clean_media_fraction),
    clogging: Number(form.clogging),
    air_changes_per_h: Number(form.air_changes_per_h),
    elements: elementsOf(values, form),
  }
  for (const [name, value] of Object.entries(values)) {
    const { path } = fieldOf(name as FieldName)
    if (value !== undefined && !path.startsWith("elements")) put(tree, path, value)
  }
  put(tree, "hose.corrugation_factor", Number(form.corrugation_factor))
  if (form.method) put(tree, "equipment.method", form.method)
  if (form.control) put(tree, "equipment.control", form.control)
  return tree as PlanRequest
}

const counted = ["barb", "quick_release", "bend", "elbow", "heater", "uv"] as const

function elementsOf(values: Partial<Record<FieldName, FieldValue>>, form: BenchForm): ElementInput[] {
  const outflow = { kind: form.outflow } as ElementInput
  const holes = {
    hole_count: values.hole_count as number | undefined,
    hole_diameter_mm: values.hole_diameter_mm as number | undefined,
  }
  return [
    form.outflow === "spray_bar" ? { ...outflow, ...holes } : outflow,
    { kind: form.intake } as ElementInput,
    ...counted.flatMap((kind) => {
      const many = values[kind]
      return typeof many === "number" && many > 0 ? [{ kind, count: many }] : []
    }),
  ]
}

/** Writes a value at a path as `cylinders.0.price`; a number in the path is a place in a list. */
function put(tree: Record<string, unknown>, path: string, value: unknown): void {
  const steps = path.split(".")
  const last = steps.pop()!
  let at = tree
  steps.forEach((step, index) => {
    at[step] ??= /^\d+$/.test(steps[index + 1] ?? last) ? [] : {}
    at = at[step] as Record<string, unknown>
  })
  at[last] = value
}

const halfFilled = "This belongs to what you filled in beside it: fill it in too, or empty the others."

function problemsOf(error: z.ZodError, names: readonly FieldName[]): Problems {
  const problems: Problems = {}
  for (const { code, path, message } of error.issues) {
    // Only a half-filled group can lack a number here: each field was read before.
    problems[fieldAt(path.join("."), names)] ??= code === "invalid_type" ? halfFilled : message
  }
  return problems
}

/** The field of the form that a field of the engine's input is typed in. */
function fieldAt(path: string, names: readonly FieldName[]): FieldName | "sheet" {
  const last = path.split(".").at(-1)
  return (
    names.find((name) => name === path || fieldOf(name).path === path) ??
    names.find((name) => path.startsWith(`${fieldOf(name).path}.`)) ??
    names.find((name) => fieldOf(name).quantity === last) ??
    (path === "volume_l" && names.includes("height_cm") ? "height_cm" : "sheet")
  )
}
