import { differenceToBase, fromBase, toBase, type UnitId, units } from "@/lib/units/convert"
import { parseDecimal } from "./decimal"

/** A unit in which a person may give a quantity, with what the slider spans and its step in that unit. */
export interface FieldUnit {
  /** null: the quantity has one way to be written, as pH has. */
  readonly id: UnitId | null
  readonly from: number
  readonly to: number
  readonly step: number
  /** Decimals of a value that the widget itself writes into the field. */
  readonly decimals: number
}

/** What can be asked for: a quantity with its bounds in the engine's unit, in one of some units. */
export interface FieldKind {
  readonly min: number
  readonly max: number
  readonly units: readonly [FieldUnit, ...FieldUnit[]]
}

export type FieldProblem = "empty" | "not_a_number" | "too_low" | "too_high"

/** A field: what stands in it, and the last value that could be used, in the engine's unit. */
export interface Field {
  readonly text: string
  readonly value: number
  readonly unit: FieldUnit
  readonly problem: FieldProblem | null
}

/** Writes a number into a field, with so many decimals at most. */
export type WriteNumber = (value: number, decimals: number) => string

/** A field that holds a value, given in the engine's unit. An unknown unit is the first of the kind. */
export function fieldOf(kind: FieldKind, value: number, unitId: string | null, write: WriteNumber): Field {
  const unit = kind.units.find(({ id }) => id === unitId) ?? kind.units[0]
  return { value, unit, text: write(shownValue(value, unit), unit.decimals), problem: null }
}

/** The field after a person typed into it. What cannot be used leaves the last value that could. */
export function typed(kind: FieldKind, field: Field, text: string): Field {
  const shown = parseDecimal(text)
  if (shown === null) {
    return { ...field, text, problem: text.trim() === "" ? "empty" : "not_a_number" }
  }
  const { id, decimals } = field.unit
  const value = id ? toBase(shown, id) : shown
  // A bound is shown rounded, and has to be good when it is typed as shown.
  const rounding = 0.5 * 10 ** -decimals
  const slack = id ? differenceToBase(rounding, id) : rounding
  if (value < kind.min - slack) return { ...field, text, problem: "too_low" }
  if (value > kind.max + slack) return { ...field, text, problem: "too_high" }
  return { ...field, text, value: within(kind, value), problem: null }
}

/** The field after a person moved its slider to a value in the field's unit. */
export function slid(kind: FieldKind, field: Field, shown: number, write: WriteNumber): Field {
  const { id, decimals } = field.unit
  return {
    ...field,
    value: within(kind, id ? toBase(shown, id) : shown),
    text: write(shown, decimals),
    problem: null,
  }
}

/** A value in the engine's unit as it is shown in a field's unit. */
export function shownValue(value: number, { id }: FieldUnit): number {
  return id ? fromBase(value, id) : value
}

/** What is written beside a number in this unit. */
export function symbolOf({ id }: FieldUnit): string {
  return id ? units[id].symbol : ""
}

function within({ min, max }: FieldKind, value: number): number {
  return Math.min(max, Math.max(min, value))
}
