import type { CurvePoint } from "@/lib/flow/pump-curve"
import { fromBase } from "@/lib/units/convert"
import { type Quantity, type QuantityName, quantities } from "@/lib/units/quantities"
import { type BenchUnits, fieldSymbol, fieldUnit, metricUnits, numberOf, textOf } from "./bench-units"
import { type BenchForm, type FieldName, fieldNames, fieldOf, startForm, usStart } from "./fields"

/** What a field stands for in the engine's units; undefined where an optional one is empty. */
export type FieldValue = number | readonly CurvePoint[] | undefined

/** Values behind texts that we wrote ourselves, so that a change of units rounds what is shown and nothing else. */
export type Exact = Partial<Record<FieldName, { readonly text: string; readonly value: FieldValue }>>

/** The form with the units that its texts are in. */
export interface Sheet {
  readonly form: BenchForm
  readonly exact: Exact
  readonly units: BenchUnits
}

/** What cannot be used in a field, and how to mend it. */
export interface Unusable {
  readonly problem: string
}

/** A new customer, with round numbers in the units of the counter. */
export function startSheet(units: BenchUnits): Sheet {
  const sheet = inUnits({ form: startForm, exact: {}, units: metricUnits }, units)
  return units.system === "us" ? withValues(sheet, usStart) : sheet
}

/** The same customer's tank written in other units. A text that cannot be read stays as it is. */
export function inUnits(sheet: Sheet, units: BenchUnits): Sheet {
  const values = fieldNames.flatMap((name) => {
    const value = readField(sheet, name)
    return value === undefined || isUnusable(value) ? [] : [[name, value] as const]
  })
  return withValues({ ...sheet, exact: {}, units }, Object.fromEntries(values))
}

/** The sheet with values of the engine written into its fields; undefined empties a field. */
export function withValues(sheet: Sheet, values: Partial<Record<FieldName, FieldValue>>): Sheet {
  const form = { ...sheet.form }
  const exact = { ...sheet.exact }
  for (const [key, value] of Object.entries(values)) {
    const name = key as FieldName
    const text = written(name, value, sheet.units)
    form[name] = text
    exact[name] = { text, value }
  }
  return { ...sheet, form, exact }
}

/** What a field stands for, in the engine's units. */
export function readField({ form, exact, units }: Sheet, name: FieldName): FieldValue | Unusable {
  const text = form[name].trim()
  const own = exact[name]
  if (own !== undefined && own.text === form[name]) return own.value
  const { kind, quantity, optional } = fieldOf(name)
  if (text === "") return optional ? undefined : { problem: "Write a number." }
  if (kind === "clock") return clockOf(text)
  if (kind === "count") return countOf(text)
  if (kind === "curve") return curveOf(text, units)
  return quantityOf(text, quantity!, units)
}

export function isUnusable(value: FieldValue | Unusable): value is Unusable {
  return typeof value === "object" && "problem" in value
}

function written(name: FieldName, value: FieldValue, units: BenchUnits): string {
  if (value === undefined) return ""
  const { kind, quantity } = fieldOf(name)
  if (typeof value === "number") {
    if (kind === "clock") return clockText(value)
    return quantity === undefined ? String(value) : textOf(value, quantities[quantity].unit, units)
  }
  return value
    .map(({ flow_l_h, head_m }) => `${textOf(flow_l_h, "L/h", units)}  ${textOf(head_m, "m", units)}`)
    .join("\n")
}

function quantityOf(text: string, name: QuantityName, units: BenchUnits): number | Unusable {
  const quantity: Quantity = quantities[name]
  const value = numberOf(text, quantity.unit, units)
  if (!Number.isFinite(value)) return { problem: "Write a number." }
  const { min, max } = quantity
  // A bound is said rounded, and has to be good when it is typed as it was said.
  const slack = 1e-3 * (Math.abs(value) + 1e-9)
  if (value < min - slack || value > max + slack) {
    return { problem: `Enter ${bounds(quantity, units)}; you gave ${text}.` }
  }
  return Math.min(max, Math.max(min, value))
}

function bounds({ min, max, unit }: Quantity, units: BenchUnits): string {
  return `${textOf(min, unit, units)} to ${textOf(max, unit, units)} ${fieldSymbol(unit, units)}`.trim()
}

function countOf(text: string): number | Unusable {
  const value = Number(text)
  return Number.isInteger(value) && value >= 0 && value <= 100
    ? value
    : { problem: "Enter a whole number from 0 to 100." }
}

function clockOf(text: string): number | Unusable {
  const [, hours, minutes] = /^(\d{1,2}):(\d{2})$/.exec(text) ?? []
  const value = Number(hours) + Number(minutes) / 60
  return value >= 0 && value < 24 ? value : { problem: "Enter a time of day, as 10:00." }
}

function clockText(hours: number): string {
  const minutes = Math.round(hours * 60) % 1440
  return `${String(Math.floor(minutes / 60)).padStart(2, "0")}:${String(minutes % 60).padStart(2, "0")}`
}

function curveOf(text: string, units: BenchUnits): readonly CurvePoint[] | Unusable {
  const lines = text.split("\n").filter((line) => line.trim() !== "")
  const points = lines.map((line) => {
    const [flow = "", head = ""] = line.trim().split(/[\s;]+/)
    return { flow_l_h: numberOf(flow, "L/h", units), head_m: numberOf(head, "m", units) }
  })
  const bad = points.findIndex(({ flow_l_h, head_m }) => !(flow_l_h >= 0 && head_m >= 0))
  if (bad >= 0) return { problem: `Line ${bad + 1}: write a flow and a head, as ${exampleLine(units)}.` }
  return points.length < 2
    ? { problem: `Write at least two lines of flow and head, as ${exampleLine(units)}.` }
    : points
}

function exampleLine(units: BenchUnits): string {
  const shown = (value: number, base: string) => {
    const unit = fieldUnit(base, units)
    return Number((unit === undefined ? value : fromBase(value, unit)).toPrecision(2))
  }
  return `“${shown(600, "L/h")} ${shown(1.2, "m")}”`
}
