import { type BaseUnit, fromBase, systems, type UnitId, type UnitSystem, units } from "./convert"

/** How one person wants to read numbers. */
export interface Reading {
  readonly locale: string
  readonly system: UnitSystem
  /** Carbonate and total hardness are chosen apart from the system: kits differ more than countries. */
  readonly kh?: UnitId | undefined
  readonly gh?: UnitId | undefined
  /** A thermometer may differ from the system as well. */
  readonly temperature?: UnitId | undefined
}

/** A number and its unit, apart, so that the unit can stand beside it in its own type. */
export interface Written {
  readonly figure: string
  readonly unit: string
}

/** Which unit a person reads an engine unit in; undefined when the engine's own is the only one. */
export function unitFor(base: string, reading: Reading): UnitId | undefined {
  if (base === "dKH") return reading.kh ?? "dkh"
  if (base === "dGH") return reading.gh ?? "dgh"
  if (base === "°C" && reading.temperature) return reading.temperature
  return systems[reading.system][base as BaseUnit]
}

/** A value in the engine's unit, written for a person: significant digits, or two decimals for a pH. */
export function written(value: number, base: string, reading: Reading, digits = 2): Written {
  const unit = unitFor(base, reading)
  const shown = unit === undefined ? value : fromBase(value, unit)
  return { figure: numbers(base, reading, digits).format(shown), unit: symbol(base, unit) }
}

/** An interval in the engine's unit: "13–36", in the person's own way of writing a range. */
export function writtenRange(low: number, high: number, base: string, reading: Reading, digits = 2): Written {
  const unit = unitFor(base, reading)
  const shown = (value: number) => (unit === undefined ? value : fromBase(value, unit))
  const format = numbers(base, reading, digits)
  return { figure: format.formatRange(shown(low), shown(high)), unit: symbol(base, unit) }
}

function symbol(base: string, unit: UnitId | undefined): string {
  if (base === "1" || base === "pH") return ""
  return unit === undefined ? base : units[unit].symbol
}

function numbers(base: string, { locale }: Reading, digits: number): Intl.NumberFormat {
  return base === "pH"
    ? new Intl.NumberFormat(locale, { minimumFractionDigits: 2, maximumFractionDigits: 2 })
    : new Intl.NumberFormat(locale, { maximumSignificantDigits: digits })
}
