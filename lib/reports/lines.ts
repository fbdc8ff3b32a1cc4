import { type Reading, written, writtenRange } from "@/lib/units/format"
import { type QuantityName, quantities } from "@/lib/units/quantities"

/** One line of a sheet: what it is, and its value in metric and in US customary units. */
export interface Line {
  readonly name: string
  readonly metric: string
  /** Absent where it reads the same. */
  readonly us?: string
}

export const metric: Reading = { locale: "en", system: "metric" }
const us: Reading = { locale: "en", system: "us", temperature: "f", kh: "kh_ppm_caco3", gh: "gh_ppm_caco3" }

/** A number of the engine, and its interval where it has one; null where the engine gives none and says why. */
export function numberLine(
  name: string,
  quantity: QuantityName,
  value: number | null,
  interval?: readonly [low: number | null, high: number | null],
  digits = 3,
): Line {
  if (value === null) return wordLine(name, "none: see the cautions")
  const { unit } = quantities[quantity]
  const say = (reading: Reading) => {
    const { figure, unit: symbol } = written(value, unit, reading, digits)
    const [low, high] = interval ?? [null, null]
    const known = low !== null && high !== null
    const range = known && ` (${writtenRange(low, high, unit, reading, digits).figure})`
    return `${figure}${range || ""} ${symbol}`.trim()
  }
  return wordLine(name, say(metric), say(us))
}

/** A line whose value is words. */
export function wordLine(name: string, said: string, saidInUs = said): Line {
  return said === saidInUs ? { name, metric: said } : { name, metric: said, us: saidInUs }
}

/** A time of day, from hours after midnight. */
export function clock(hours: number): string {
  const minutes = Math.round(hours * 60) % 1440
  return `${String(Math.floor(minutes / 60)).padStart(2, "0")}:${String(minutes % 60).padStart(2, "0")}`
}

/** Every number and word of a flat result that the table of quantities knows, a line each. */
export function linesOf(values: Readonly<Record<string, unknown>>): Line[] {
  return Object.entries(values).flatMap(([name, value]) => {
    if (typeof value === "number" && name in quantities) {
      const quantity = name as QuantityName
      return [numberLine(quantities[quantity].description, quantity, value)]
    }
    return typeof value === "string" ? [wordLine(sentence(name), sentence(value).toLowerCase())] : []
  })
}

/** A wire name in words: `ionic_strength_source` is "Ionic strength source". */
function sentence(name: string): string {
  const words = name.replaceAll("_", " ")
  return words.charAt(0).toUpperCase() + words.slice(1)
}
