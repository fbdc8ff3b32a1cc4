import { dielectric, waterDensity } from "./water"

/** Single-ion activity coefficients of the species that the carbonate model needs; all are 1 in pure water. */
export interface ActivityCoefficients {
  readonly h: number
  readonly oh: number
  readonly hco3: number
  readonly co3: number
  readonly co2: number
  readonly h2po4: number
  readonly hpo4: number
}

/**
 * Debye-Hückel constants: `a` in kg^½ mol^-½ (0.5100 at 25 °C), `b` per Å.
 *
 * @source truesdellJones1974, eqs 11 and 12
 */
export function debyeHuckel(temperature_c: number): { readonly a: number; readonly b: number } {
  const rootDensity = Math.sqrt(waterDensity(temperature_c) / 1000)
  const et = dielectric(temperature_c) * (temperature_c + 273.15)
  return { a: (1.82483e6 * rootDensity) / (et * Math.sqrt(et)), b: (50.2916 * rootDensity) / Math.sqrt(et) }
}

/**
 * Activity coefficients at an ionic strength in mol/L: log γ = -A z² √m/(1 + B å √m) + b m, with m in mol/kg.
 *
 * @source truesdellJones1974, eq. 13; ion sizes å and b of parkhurstAppelo2013 (phreeqc.dat): H+ 9, OH- 3.5,
 * HCO3- 5.4 and 0.0078, CO3-- 5.4, H2PO4- 5.4, HPO4-- 5.0 Å; CO2 0.066 m. Range: up to 0.05 mol/L.
 */
export function activityCoefficients({
  temperature_c,
  ionic_strength_mol_l,
}: {
  readonly temperature_c: number
  readonly ionic_strength_mol_l: number
}): ActivityCoefficients {
  const { a, b } = debyeHuckel(temperature_c)
  const m = (ionic_strength_mol_l * 1000) / waterDensity(temperature_c)
  const root = Math.sqrt(m)
  const slope = -a * root * Math.LN10
  const br = b * root
  // CO3-- and H2PO4- share HCO3-'s ion size, so their terms are powers of one exponential.
  const size54 = slope / (1 + 5.4 * br)
  return {
    h: Math.exp(slope / (1 + 9 * br)),
    oh: Math.exp(slope / (1 + 3.5 * br)),
    hco3: Math.exp(size54 + 0.0078 * m * Math.LN10),
    co3: Math.exp(4 * size54),
    co2: Math.exp(0.066 * m * Math.LN10),
    h2po4: Math.exp(size54),
    hpo4: Math.exp((4 * slope) / (1 + 5 * br)),
  }
}
