/** One line of a reference file, by column name. */
export type Row = Readonly<Record<string, string>>

/** How far the engine is from one number of a reference row. */
export interface Deviation {
  readonly kind: string
  readonly quantity: string
  readonly expected: number
  readonly actual: number
  /** Absolute, or relative to `expected`, as `relative` says. Infinity when there is no number to compare. */
  readonly deviation: number
  readonly tolerance: number
  readonly relative: boolean
}

/** One kind of reference file: how to know it, and what the engine makes of one of its rows. */
export interface ReferenceFormat {
  readonly name: string
  recognises(header: readonly string[]): boolean
  /** Throws {@link BadRow} for a kind, a quantity or a value that it does not know. Never returns nothing. */
  check(row: Row): readonly Deviation[]
}

export class BadRow extends Error {}

/** The comparison of one number. Both infinite, with the same sign, agree. */
export function deviation(
  parts: Omit<Deviation, "deviation" | "tolerance" | "relative">,
  tolerance: Tolerance,
): Deviation {
  const { expected, actual } = parts
  const difference = Math.abs(actual - expected)
  const scaled = tolerance.relative && difference !== 0 ? difference / Math.abs(expected) : difference
  const value = actual === expected ? 0 : Number.isNaN(scaled) ? Number.POSITIVE_INFINITY : scaled
  return { ...parts, deviation: value, tolerance: tolerance.value, relative: tolerance.relative }
}

export function passes(d: Deviation): boolean {
  return d.deviation <= d.tolerance
}

/** A number of the row. Throws {@link BadRow} when the column is missing, empty or not a finite number. */
export function number(row: Row, column: string): number {
  const value = optionalNumber(row, column)
  if (value === undefined) throw new BadRow(`${column} is missing`)
  return value
}

export function optionalNumber(row: Row, column: string): number | undefined {
  const text = row[column]?.trim()
  if (text === undefined || text === "") return undefined
  const value = Number(text)
  if (!Number.isFinite(value)) throw new BadRow(`${column} is not a number: ${text}`)
  return value
}

export interface Tolerance {
  readonly value: number
  readonly relative: boolean
}

/** Within this share of the expected value. */
export const relativeTo = (value: number): Tolerance => ({ value, relative: true })

/** Within this difference. */
export const within = (value: number): Tolerance => ({ value, relative: false })

/**
 * A tolerance as the published files write it: `0.001` (absolute), `0.8%`, `0.7 % vs somebody`, or one for each range
 * of temperature, `1% at 5-25 C; 2.5% at 30-35 C`. Between two ranges the nearer one counts.
 */
export function parseTolerance(text: string, temperature_c: number): Tolerance {
  const clauses = text.split(";").map((clause) => {
    const match = /^\s*[±]?\s*([\d.]+(?:e[+-]?\d+)?)\s*(%)?(.*)$/i.exec(clause)
    if (!match) throw new BadRow(`tolerance not understood: ${text}`)
    const range = /at\s+(-?[\d.]+)(?:\s*(?:-|–|to)\s*(-?[\d.]+))?\s*°?\s*C\b/i.exec(match[3]!)
    const from = range ? Number(range[1]) : Number.NEGATIVE_INFINITY
    const to = range ? Number(range[2] ?? range[1]) : Number.POSITIVE_INFINITY
    const value = Number(match[1])
    return {
      from,
      to,
      tolerance: match[2] ? relativeTo(Number((value / 100).toPrecision(12))) : within(value),
    }
  })
  const distance = (c: { from: number; to: number }) =>
    Math.max(c.from - temperature_c, temperature_c - c.to, 0)
  return clauses.reduce((best, clause) => (distance(clause) < distance(best) ? clause : best)).tolerance
}
