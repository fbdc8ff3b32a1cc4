import { hermite } from "@/lib/numeric/interpolate"

/** Reynolds numbers between which the flow is neither laminar nor turbulent for good. */
export const LAMINAR_BELOW = 2000
const TURBULENT_FROM = 4000

/** What the flow in a hose is like. In `transitional` flow the real friction wanders by about 20 %. */
export type Regime = "laminar" | "transitional" | "turbulent"

export function regimeOf(reynolds: number): Regime {
  if (reynolds <= LAMINAR_BELOW) return "laminar"
  return reynolds < TURBULENT_FROM ? "transitional" : "turbulent"
}

/**
 * Darcy friction factor of a round pipe, dimensionless.
 *
 * @source hagenPoiseuille below Re 2,000; colebrook1939 from Re 4,000. Between them a cubic that meets both in value
 * and slope, so that a solver sees no kink; the curve there is a convention, real transition flow is unsteady.
 * Valid for a Reynolds number above 0 and a roughness of up to 5 % of the bore. Within 0.5 % in flow of EPANET 2.3.
 */
export function frictionFactor(reynolds: number, relativeRoughness: number): number {
  if (reynolds <= LAMINAR_BELOW) return 64 / reynolds
  if (reynolds >= TURBULENT_FROM) return colebrook(reynolds, relativeRoughness)
  return transition(reynolds, relativeRoughness)
}

/**
 * Colebrook's friction factor, solved by Newton's method to the last digits.
 *
 * @source colebrook1939: 1/√f = −2 log10(ε/3.7D + 2.51/(Re √f)); first guess swameeJain1976.
 */
export function colebrook(reynolds: number, relativeRoughness: number): number {
  const rough = relativeRoughness / 3.7
  const smooth = 2.51 / reynolds
  let x = -TWO_OVER_LN10 * Math.log(rough + 5.74 / reynolds ** 0.9)
  for (let step = 0; step < 8; step++) {
    const inside = rough + smooth * x
    const change = (x + TWO_OVER_LN10 * Math.log(inside)) / (1 + (TWO_OVER_LN10 * smooth) / inside)
    x -= change
    // Newton squares its error, so what is left after such a step is below the last digit.
    if (Math.abs(change) < 1e-7 * x) break
  }
  return 1 / (x * x)
}

const TWO_OVER_LN10 = 2 / Math.LN10

/** Cubic in f(Re) from 64/Re at 2,000 to Colebrook at 4,000, with their values and slopes. */
function transition(reynolds: number, relativeRoughness: number): number {
  const h = TURBULENT_FROM - LAMINAR_BELOW
  const turbulent = colebrook(TURBULENT_FROM, relativeRoughness)
  return hermite({
    s: (reynolds - LAMINAR_BELOW) / h,
    h,
    y0: 64 / LAMINAR_BELOW,
    y1: turbulent,
    m0: -64 / LAMINAR_BELOW ** 2,
    m1: colebrookSlope(TURBULENT_FROM, relativeRoughness, turbulent),
  })
}

/** df/dRe of Colebrook's equation, by implicit differentiation in x = 1/√f. */
function colebrookSlope(reynolds: number, relativeRoughness: number, f: number): number {
  const x = 1 / Math.sqrt(f)
  const inside = relativeRoughness / 3.7 + (2.51 * x) / reynolds
  const slopeOfX =
    (TWO_OVER_LN10 * 2.51 * x) / (inside * reynolds ** 2) / (1 + (TWO_OVER_LN10 * 2.51) / (reynolds * inside))
  return (-2 * slopeOfX) / x ** 3
}
