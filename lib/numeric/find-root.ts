/** A solver stopped without an answer. `reason` tells a missing bracket from a loop that ran out. */
export class NotConverged extends Error {
  readonly code = "not_converged"

  constructor(
    readonly reason: "no_bracket" | "iterations",
    detail: string,
  ) {
    super(detail)
    this.name = "NotConverged"
  }
}

export interface RootProblem {
  /** Continuous on [low, high], with values of opposite sign (or zero) at the two ends. */
  readonly f: (x: number) => number
  readonly low: number
  readonly high: number
  /** Absolute, in the unit of x. */
  readonly tolerance: number
  readonly maxIterations?: number
}

/**
 * The x in [low, high] where f crosses zero, to within `tolerance`.
 *
 * @source brent1973, chapter 4: bisection, secant and inverse quadratic steps; never slower than bisection squared.
 *
 * Throws {@link NotConverged} when the ends do not bracket a root, when f is not a number, or after
 * `maxIterations` (100) steps.
 */
export function findRoot({ f, low, high, tolerance, maxIterations = 100 }: RootProblem): number {
  let a = low
  let b = high
  let fa = f(a)
  let fb = f(b)
  if (fa === 0) return a
  if (fb === 0) return b
  if (!(fa < 0 !== fb < 0) || Number.isNaN(fa + fb)) {
    throw new NotConverged("no_bracket", `no sign change between ${low} (${fa}) and ${high} (${fb})`)
  }
  let c = a
  let fc = fa
  let step = b - a
  let previousStep = step
  for (let i = 0; i < maxIterations; i++) {
    if (fb < 0 === fc < 0) {
      c = a
      fc = fa
      step = b - a
      previousStep = step
    }
    if (Math.abs(fc) < Math.abs(fb)) {
      a = b
      b = c
      c = a
      fa = fb
      fb = fc
      fc = fa
    }
    const limit = 2 * Number.EPSILON * Math.abs(b) + tolerance / 2
    const half = (c - b) / 2
    if (Math.abs(half) <= limit || fb === 0) return b
    if (Math.abs(previousStep) < limit || Math.abs(fa) <= Math.abs(fb)) {
      step = half
      previousStep = half
    } else {
      const s = fb / fa
      let p = 2 * half * s
      let q = 1 - s
      if (a !== c) {
        const u = fa / fc
        const v = fb / fc
        p = s * (2 * half * u * (u - v) - (b - a) * (v - 1))
        q = (u - 1) * (v - 1) * (s - 1)
      }
      if (p > 0) q = -q
      else p = -p
      if (2 * p < Math.min(3 * half * q - Math.abs(limit * q), Math.abs(previousStep * q))) {
        previousStep = step
        step = p / q
      } else {
        step = half
        previousStep = half
      }
    }
    a = b
    fa = fb
    b += Math.abs(step) > limit ? step : half > 0 ? limit : -limit
    fb = f(b)
    if (Number.isNaN(fb)) throw new NotConverged("no_bracket", `the function is not a number at ${b}`)
  }
  throw new NotConverged("iterations", `no root within ${tolerance} after ${maxIterations} steps`)
}
