import { fromBase, units } from "@/lib/units/convert"
import { type Reading, unitFor } from "@/lib/units/format"

/** A value of the engine in the unit that it is read in, as a number for an axis. */
export function shownIn(value: number, base: string, reading: Reading): number {
  const unit = unitFor(base, reading)
  return unit === undefined ? value : fromBase(value, unit)
}

/** The unit that an axis of a base unit is read in. */
export function symbolIn(base: string, reading: Reading): string {
  const unit = unitFor(base, reading)
  return unit === undefined ? base : units[unit].symbol
}
