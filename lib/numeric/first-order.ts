/**
 * Closed forms of x' = k (limit - x), k > 0: what a tank's CO2, a probe or a room does between two switchings.
 * Times in the unit of 1/k.
 */

/** x after a time. */
export function levelAfter(p: {
  readonly start: number
  readonly limit: number
  readonly k: number
  readonly time: number
}): number {
  return p.limit + (p.start - p.limit) * Math.exp(-p.k * p.time)
}

/** Time until x is at `target`; 0 if it is there, `null` if it moves the other way or never gets there. */
export function timeToLevel(p: {
  readonly start: number
  readonly limit: number
  readonly k: number
  readonly target: number
}): number | null {
  if (p.target === p.start) return 0
  const remaining = (p.limit - p.target) / (p.limit - p.start)
  return remaining > 0 && remaining < 1 ? -Math.log(remaining) / p.k : null
}

/** Integral of x over a time. */
export function levelIntegral(p: {
  readonly start: number
  readonly limit: number
  readonly k: number
  readonly time: number
}): number {
  return p.limit * p.time - ((p.start - p.limit) * Math.expm1(-p.k * p.time)) / p.k
}
