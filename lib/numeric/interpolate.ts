/** A table y(x) with x strictly increasing and at least two rows. */
export interface Table {
  readonly x: readonly number[]
  readonly y: readonly number[]
}

/** Straight lines between the rows of the table; the end lines go on outside it. */
export function interpolateLinear(table: Table, at: number): number {
  const i = interval(table.x, at)
  const x0 = table.x[i]!
  const y0 = table.y[i]!
  return y0 + ((at - x0) * (table.y[i + 1]! - y0)) / (table.x[i + 1]! - x0)
}

/**
 * The slope at each row that keeps a cubic through monotone data monotone.
 *
 * @source fritschCarlson1980, with the weighted harmonic mean inside and the limited three-point rule at the ends.
 */
export function monotoneSlopes({ x, y }: Table): number[] {
  const n = x.length
  if (n === 2) {
    const slope = (y[1]! - y[0]!) / (x[1]! - x[0]!)
    return [slope, slope]
  }
  const width: number[] = []
  const secant: number[] = []
  for (let i = 0; i < n - 1; i++) {
    width.push(x[i + 1]! - x[i]!)
    secant.push((y[i + 1]! - y[i]!) / width[i]!)
  }
  const slopes = [endSlope(width[0]!, width[1]!, secant[0]!, secant[1]!)]
  for (let i = 1; i < n - 1; i++) {
    const before = secant[i - 1]!
    const after = secant[i]!
    const w1 = 2 * width[i]! + width[i - 1]!
    const w2 = width[i]! + 2 * width[i - 1]!
    slopes.push(before * after <= 0 ? 0 : (w1 + w2) / (w1 / before + w2 / after))
  }
  slopes.push(endSlope(width[n - 2]!, width[n - 3]!, secant[n - 2]!, secant[n - 3]!))
  return slopes
}

/** The cubic through the rows with the given slopes; `at` lies inside the table. */
export function interpolateCubic(table: Table, slopes: readonly number[], at: number): number {
  const i = interval(table.x, at)
  const h = table.x[i + 1]! - table.x[i]!
  return hermite({
    s: (at - table.x[i]!) / h,
    h,
    y0: table.y[i]!,
    y1: table.y[i + 1]!,
    m0: slopes[i]!,
    m1: slopes[i + 1]!,
  })
}

/** Cubic Hermite: y at the fraction s of an interval of width h with end values y0, y1 and end slopes m0, m1. */
export function hermite(p: {
  readonly s: number
  readonly h: number
  readonly y0: number
  readonly y1: number
  readonly m0: number
  readonly m1: number
}): number {
  const { s } = p
  const r = 1 - s
  return r * r * ((1 + 2 * s) * p.y0 + s * p.h * p.m0) + s * s * ((1 + 2 * r) * p.y1 - r * p.h * p.m1)
}

/** Index of the row that starts the interval holding `at`: the first or the last interval when it lies outside. */
function interval(x: readonly number[], at: number): number {
  let low = 0
  let high = x.length - 1
  while (high - low > 1) {
    const middle = (low + high) >> 1
    if (x[middle]! <= at) low = middle
    else high = middle
  }
  return low
}

function endSlope(h0: number, h1: number, d0: number, d1: number): number {
  const slope = ((2 * h0 + h1) * d0 - h0 * d1) / (h0 + h1)
  if (slope * d0 <= 0) return 0
  if (d0 * d1 < 0 && Math.abs(slope) > 3 * Math.abs(d0)) return 3 * d0
  return slope
}
