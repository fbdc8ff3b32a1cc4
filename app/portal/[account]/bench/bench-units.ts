import { fromBase, toBase, type UnitId, type UnitSystem, units as unitTable } from "@/lib/units/convert"
import { type Reading, unitFor } from "@/lib/units/format"

/** How the counter reads numbers: chosen once, remembered for the next customer. */
export interface BenchUnits {
  readonly system: UnitSystem
  readonly temperature: "c" | "f"
  readonly kh: "dkh" | "kh_ppm_caco3" | "kh_meq_l"
}

export const metricUnits: BenchUnits = { system: "metric", temperature: "c", kh: "dkh" }

/** The same choice as the formatting of the engine's values knows it; total hardness goes with carbonate hardness. */
export function readingOf({ system, temperature, kh }: BenchUnits): Reading {
  return { locale: "en", system, kh, gh: kh === "kh_ppm_caco3" ? "gh_ppm_caco3" : "dgh", temperature }
}

/** The unit that a field of a base unit is written in; undefined when the engine's own is the only one. */
export function fieldUnit(base: string, units: BenchUnits): UnitId | undefined {
  return unitFor(base, readingOf(units))
}

/** What stands inside a field beside the number. */
export function fieldSymbol(base: string, units: BenchUnits): string {
  if (base === "1" || base === "pH") return ""
  const unit = fieldUnit(base, units)
  return unit === undefined ? base : unitTable[unit].symbol
}

/** Digits that a field shows after a change of units; the exact value is kept beside it. */
const FIELD_DIGITS = 4

/** A value in the engine's unit as the text of a field. */
export function textOf(value: number, base: string, units: BenchUnits): string {
  const unit = fieldUnit(base, units)
  return String(Number((unit === undefined ? value : fromBase(value, unit)).toPrecision(FIELD_DIGITS)))
}

/** The number that a text holds, in the engine's unit; NaN when it holds none. Either decimal mark. */
export function numberOf(text: string, base: string, units: BenchUnits): number {
  const plain = text.trim().replace(",", ".")
  const shown = plain === "" ? Number.NaN : Number(plain)
  const unit = fieldUnit(base, units)
  return unit === undefined ? shown : toBase(shown, unit)
}

export function isBenchUnits(value: unknown): value is BenchUnits {
  if (typeof value !== "object" || value === null) return false
  const { system, temperature, kh } = value as Record<string, unknown>
  return (
    (system === "metric" || system === "us") &&
    (temperature === "c" || temperature === "f") &&
    (kh === "dkh" || kh === "kh_ppm_caco3" || kh === "kh_meq_l")
  )
}
