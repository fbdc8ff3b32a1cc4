/**
 * A number as it stands in a sentence: so many significant digits, no exponent, no trailing zeros.
 * `figures(567.65, 3)` is "568", `figures(0.0456, 2)` is "0.046".
 */
export function figures(value: number, digits: number): string {
  const rounded = Number(value.toPrecision(digits))
  const tiny = rounded !== 0 && Math.abs(rounded) < 1e-6
  return tiny ? rounded.toFixed(20).replace(/0+$/, "") : String(rounded)
}

/** The value to so many significant digits, as a number: what the API and the files carry. */
export function roundSignificant(value: number, digits = 6): number {
  return value === 0 ? 0 : Number(value.toPrecision(digits))
}
