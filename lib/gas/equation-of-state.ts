import { CRITICAL_PRESSURE_PA, CRITICAL_TEMPERATURE_K } from "./carbon-dioxide"

/** kg/m³. @source spanWagner1996, eq. 3.5 */
export const CRITICAL_DENSITY_KG_M3 = 467.6
/** °C. */
export const CRITICAL_TEMPERATURE_C = CRITICAL_TEMPERATURE_K - 273.15

export interface Saturation {
  readonly pressure_pa: number
  readonly liquid_kg_m3: number
  readonly vapour_kg_m3: number
}

/**
 * Pressure and densities of CO2 where liquid and vapour are together, or `null` above the critical temperature.
 *
 * @source spanWagner1996, eqs 3.13 to 3.15, -56.6 to 30.98 °C. Pressure within 0.012 %, densities within 0.05 % (up
 * to 0.2 % within 9 K of the critical point) of the measurements.
 */
export function saturation(temperature_c: number): Saturation | null {
  const t = (temperature_c + 273.15) / CRITICAL_TEMPERATURE_K
  if (t > 1) return null
  const x = 1 - t
  const lnPressure = (-7.0602087 * x + 1.9391218 * x ** 1.5 - 1.6463597 * x ** 2 - 3.2995634 * x ** 4) / t
  const lnLiquid =
    1.9245108 * x ** 0.34 - 0.62385555 * x ** 0.5 - 0.32731127 * x ** (10 / 6) + 0.39245142 * x ** (11 / 6)
  const lnVapour =
    -1.7074879 * x ** 0.34 -
    0.8227467 * x ** 0.5 -
    4.6008549 * x -
    10.111178 * x ** (7 / 3) -
    29.742252 * x ** (14 / 3)
  return {
    pressure_pa: CRITICAL_PRESSURE_PA * Math.exp(lnPressure),
    liquid_kg_m3: CRITICAL_DENSITY_KG_M3 * Math.exp(lnLiquid),
    vapour_kg_m3: CRITICAL_DENSITY_KG_M3 * Math.exp(lnVapour),
  }
}

/**
 * Pressure of a single phase of CO2 at a density and a temperature, Pa.
 *
 * @source spanWagner1996, eq. 6.5 and table 31, first derivative in density of the Helmholtz energy (table 32).
 * -56 to 827 °C, up to 8000 bar; 0.03-0.05 % in density below 300 bar. Between the two saturated densities it gives
 * the metastable loop, which no cylinder shows: ask `saturation` first.
 */
export function singlePhasePressure(p: {
  readonly density_kg_m3: number
  readonly temperature_c: number
}): number {
  const temperature_k = p.temperature_c + 273.15
  const delta = p.density_kg_m3 / CRITICAL_DENSITY_KG_M3
  const tau = CRITICAL_TEMPERATURE_K / temperature_k
  return p.density_kg_m3 * SPECIFIC_GAS_CONSTANT * temperature_k * (1 + delta * residualSlope(delta, tau))
}

/** J/(kg·K), the paper's own value. @source spanWagner1996, eq. 3.6 */
const SPECIFIC_GAS_CONSTANT = 188.9241

/** ∂φʳ/∂δ of the residual Helmholtz energy. @source spanWagner1996, table 32 */
function residualSlope(delta: number, tau: number): number {
  let slope = 0
  for (const [n, d, t] of POWER_TERMS) slope += n * d * delta ** (d - 1) * tau ** t
  for (const [n, d, t, c] of DAMPED_TERMS) {
    const power = delta ** c
    slope += n * Math.exp(-power) * delta ** (d - 1) * tau ** t * (d - c * power)
  }
  for (const [n, d, t, alpha, beta, gamma] of BELL_TERMS) {
    const bell = Math.exp(-alpha * (delta - 1) ** 2 - beta * (tau - gamma) ** 2)
    slope += n * delta ** d * tau ** t * bell * (d / delta - 2 * alpha * (delta - 1))
  }
  for (const term of CRITICAL_TERMS) slope += criticalSlope(term, delta, tau)
  return slope
}

/** The terms that are not analytic at the critical point; they vanish there, where their formula is 0/0. */
function criticalSlope([n, a, b, B, C]: CriticalTerm, delta: number, tau: number): number {
  const D = 275
  const A = 0.7
  const inverse2Beta = 1 / 0.6
  const off = delta - 1
  const off2 = off * off
  if (off2 === 0 && tau === 1) return 0
  const theta = 1 - tau + A * off2 ** inverse2Beta
  const distance = theta ** 2 + B * off2 ** a
  const psi = Math.exp(-C * off2 - D * (tau - 1) ** 2)
  const psiSlope = -2 * C * off * psi
  // off · off2^(power - 1) written so that it stays finite where off is 0.
  const distanceSlope =
    off2 === 0
      ? 0
      : 2 * off * (2 * theta * A * inverse2Beta * off2 ** (inverse2Beta - 1) + B * a * off2 ** (a - 1))
  return (
    n * (distance ** b * (psi + delta * psiSlope) + b * distance ** (b - 1) * distanceSlope * delta * psi)
  )
}

/** n, d, t. @source spanWagner1996, table 31, terms 1 to 7 */
const POWER_TERMS: readonly (readonly [number, number, number])[] = [
  [0.38856823203161, 1, 0],
  [2.938547594274, 1, 0.75],
  [-5.5867188534934, 1, 1],
  [-0.76753199592477, 1, 2],
  [0.31729005580416, 2, 0.75],
  [0.54803315897767, 2, 2],
  [0.12279411220335, 3, 0.75],
]

/** n, d, t, c. @source spanWagner1996, table 31, terms 8 to 34 */
const DAMPED_TERMS: readonly (readonly [number, number, number, number])[] = [
  [2.165896154322, 1, 1.5, 1],
  [1.5841735109724, 2, 1.5, 1],
  [-0.23132705405503, 4, 2.5, 1],
  [0.058116916431436, 5, 0, 1],
  [-0.55369137205382, 5, 1.5, 1],
  [0.48946615909422, 5, 2, 1],
  [-0.024275739843501, 6, 0, 1],
  [0.062494790501678, 6, 1, 1],
  [-0.12175860225246, 6, 2, 1],
  [-0.37055685270086, 1, 3, 2],
  [-0.016775879700426, 1, 6, 2],
  [-0.11960736637987, 4, 3, 2],
  [-0.045619362508778, 4, 6, 2],
  [0.035612789270346, 4, 8, 2],
  [-0.0074427727132052, 7, 6, 2],
  [-0.0017395704902432, 8, 0, 2],
  [-0.021810121289527, 2, 7, 3],
  [0.024332166559236, 3, 12, 3],
  [-0.037440133423463, 3, 16, 3],
  [0.14338715756878, 5, 22, 4],
  [-0.13491969083286, 5, 24, 4],
  [-0.02315122505348, 6, 16, 4],
  [0.012363125492901, 7, 24, 4],
  [0.002105832197294, 8, 8, 4],
  [-0.00033958519026368, 10, 2, 4],
  [0.0055993651771592, 4, 28, 5],
  [-0.00030335118055646, 8, 14, 6],
]

/** n, d, t, α, β, γ; ε is 1. @source spanWagner1996, table 31, terms 35 to 39 */
const BELL_TERMS: readonly (readonly [number, number, number, number, number, number])[] = [
  [-213.6548868832, 2, 1, 25, 325, 1.16],
  [26641.569149272, 2, 0, 25, 300, 1.19],
  [-24027.212204557, 2, 1, 25, 300, 1.19],
  [-283.41603423999, 3, 3, 15, 275, 1.25],
  [212.47284400179, 3, 3, 20, 275, 1.22],
]

/** n, a, b, B, C; β is 0.3, A 0.7, D 275. @source spanWagner1996, table 31, terms 40 to 42 */
type CriticalTerm = readonly [number, number, number, number, number]
const CRITICAL_TERMS: readonly CriticalTerm[] = [
  [-0.66642276540751, 3.5, 0.875, 0.3, 10],
  [0.72608632349897, 3.5, 0.925, 0.3, 10],
  [0.055068668612842, 3, 0.875, 1, 12.5],
]
