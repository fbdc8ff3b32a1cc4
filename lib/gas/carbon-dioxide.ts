import { CO2_MG_PER_MOL } from "@/lib/units/chemistry"

/** J/(mol·K), exact since the SI of 2019. */
export const GAS_CONSTANT = 8.314462618
/** kg/mol. */
export const MOLAR_MASS_KG_MOL = CO2_MG_PER_MOL / 1e6
/** K. @source spanWagner1996, eq. 3.3 */
export const CRITICAL_TEMPERATURE_K = 304.1282
/** Pa. @source spanWagner1996, eq. 3.4 */
export const CRITICAL_PRESSURE_PA = 7.3773e6
/** Dimensionless. @source tsonopoulos1974; acentric factor of CO2 */
const ACENTRIC_FACTOR = 0.22394

/** Pa, exact. */
export const STANDARD_ATMOSPHERE_PA = 101325

export interface GasState {
  readonly pressure_pa: number
  readonly temperature_c: number
}

/**
 * Compressibility factor Z of gaseous CO2, dimensionless.
 *
 * @source tsonopoulos1974, eqs 3 to 5, cut after the second virial coefficient.
 * Valid for the gas up to 10 bar absolute and 0-50 °C. Density against the full equation of state (spanWagner1996):
 * 0.07 % up to 5 bar, 0.16 % at 10 bar and 25 °C, 0.34 % at 10 bar and 0 °C. Above that use `singlePhasePressure`.
 */
export function compressibility({ pressure_pa, temperature_c }: GasState): number {
  const temperature_k = temperature_c + 273.15
  return 1 + (secondVirial(temperature_k) * pressure_pa) / (GAS_CONSTANT * temperature_k)
}

/** Density of gaseous CO2, kg/m³, up to 10 bar absolute; source and accuracy as for `compressibility`. */
export function gasDensity(state: GasState): number {
  const idealDensity =
    (state.pressure_pa * MOLAR_MASS_KG_MOL) / (GAS_CONSTANT * (state.temperature_c + 273.15))
  return idealDensity / compressibility(state)
}

/** Second virial coefficient of CO2, m³/mol; -123.7e-6 at 25 °C. @source tsonopoulos1974, eqs 3 to 5 */
function secondVirial(temperature_k: number): number {
  const x = CRITICAL_TEMPERATURE_K / temperature_k
  const x2 = x * x
  const x3 = x2 * x
  const x8 = x3 * x3 * x2
  const simple = 0.1445 - 0.33 * x - 0.1385 * x2 - 0.0121 * x3 - 0.000607 * x8
  const acentric = 0.0637 + 0.331 * x2 - 0.423 * x3 - 0.008 * x8
  return (
    ((GAS_CONSTANT * CRITICAL_TEMPERATURE_K) / CRITICAL_PRESSURE_PA) * (simple + ACENTRIC_FACTOR * acentric)
  )
}
