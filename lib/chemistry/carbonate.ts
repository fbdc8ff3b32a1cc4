import { findRoot } from "@/lib/numeric/find-root"
import { ALKALINITY_MOL_L_PER_DKH, CO2_MG_PER_MOL, PO4_MG_PER_MOL } from "@/lib/units/chemistry"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { activityCoefficients } from "./activity"
import { logHenry, logK1, logK2, logK2Phosphate, logKw } from "./constants"
import { airPressureAtm, waterDensityKgL, waterVapourPressureAtm } from "./water"

/**
 * The carbonate system of one water at one temperature, with everything that does not depend on pH worked out.
 * Make it once, then ask as often as you like. `a` is the activity of H+, 10^-pH; concentrations are mol/L.
 */
export interface CarbonateSystem {
  readonly temperature_c: number
  readonly ionic_strength_mol_l: number
  /** CO2 = co2Factor · a · HCO3 */
  readonly co2Factor: number
  /** CO3 = co3Factor / a · HCO3 */
  readonly co3Factor: number
  /** H+ = hFactor · a */
  readonly hFactor: number
  /** OH- = ohFactor / a */
  readonly ohFactor: number
  /** Total phosphate, mol/L, and the apparent constant of H2PO4- = H+ + HPO4--. */
  readonly phosphate_mol_l: number
  readonly k2Phosphate: number
  /** Partial pressure in atm = pressurePerCo2 · CO2 */
  readonly pressurePerCo2: number
}

/** What is in the water at one pH, in mol/L but for the pressure. */
export interface Species {
  readonly co2: number
  readonly hco3: number
  readonly co3: number
  readonly h: number
  readonly oh: number
  /** HCO3- + 2 CO3--: the alkalinity less what other acids and bases hold. */
  readonly carbonateAlkalinity: number
  readonly pco2_atm: number
}

/**
 * @source plummerBusenberg1982 (K1, K2, Henry), millero1995 (Kw), truesdellJones1974 (activities),
 * ballNordstrom1991 (phosphate). Valid for 0-50 °C, ionic strength up to 0.05 mol/L, pH 4-9.5.
 * CO2 within 0.7 % of PHREEQC in sodium bicarbonate water and 2.5 % in hard water below pH 7.8.
 */
export function carbonateSystem(water: {
  readonly temperature_c: number
  readonly ionic_strength_mol_l: number
  readonly phosphate_mg_l?: number | undefined
}): CarbonateSystem {
  const { temperature_c, ionic_strength_mol_l } = water
  const gamma = activityCoefficients(water)
  const density = waterDensityKgL(temperature_c)
  return {
    temperature_c,
    ionic_strength_mol_l,
    co2Factor: gamma.hco3 / (tenTo(logK1(temperature_c)) * gamma.co2),
    co3Factor: (tenTo(logK2(temperature_c)) * gamma.hco3) / gamma.co3,
    hFactor: density / gamma.h,
    ohFactor: (density * tenTo(logKw(temperature_c))) / gamma.oh,
    phosphate_mol_l: (water.phosphate_mg_l ?? 0) / PO4_MG_PER_MOL,
    k2Phosphate: (tenTo(logK2Phosphate(temperature_c)) * gamma.h2po4) / gamma.hpo4,
    pressurePerCo2: gamma.co2 / (density * tenTo(logHenry(temperature_c))),
  }
}

/**
 * The species at a pH and a carbonate hardness.
 *
 * Throws {@link OutOfDomain} when the water holds no carbonate alkalinity at that pH, or more CO2 than 1 atm of
 * pure gas would dissolve.
 */
export function speciesAtPh(
  system: CarbonateSystem,
  { ph, kh_dkh }: { readonly ph: number; readonly kh_dkh: number },
): Species {
  const a = tenTo(-ph)
  const h = system.hFactor * a
  const oh = system.ohFactor / a
  const carbonateAlkalinity = kh_dkh * ALKALINITY_MOL_L_PER_DKH - oh + h - phosphateAlkalinity(system, a)
  if (!(carbonateAlkalinity > 0)) {
    throw new OutOfDomain(
      "kh_dkh",
      `${kh_dkh} dKH at pH ${ph} is all hydroxide and phosphate and leaves no carbonate. Measure KH again, or lower the pH or the phosphate.`,
    )
  }
  const x = system.co3Factor / a
  const hco3 = carbonateAlkalinity / (1 + 2 * x)
  const co2 = system.co2Factor * a * hco3
  const pco2_atm = system.pressurePerCo2 * co2
  if (pco2_atm > 1) {
    throw new OutOfDomain(
      "ph",
      `pH ${ph} at ${kh_dkh} dKH would hold CO2 under ${pco2_atm.toPrecision(2)} atm, more than pure CO2 gas can dissolve at 1 atm. Check the pH meter and the KH test.`,
    )
  }
  return { co2, hco3, co3: x * hco3, h, oh, carbonateAlkalinity, pco2_atm }
}

/** CO2 in mg/L at a pH and a carbonate hardness. Throws as {@link speciesAtPh}. */
export function co2AtPh(
  system: CarbonateSystem,
  water: { readonly ph: number; readonly kh_dkh: number },
): number {
  return speciesAtPh(system, water).co2 * CO2_MG_PER_MOL
}

/**
 * The pH at which water of a carbonate hardness holds an amount of CO2, to 1e-11. Any CO2 from 0 up has one, also
 * outside the model's pH range: the caller judges that.
 */
export function phAtCo2(
  system: CarbonateSystem,
  { co2_mg_l, kh_dkh }: { readonly co2_mg_l: number; readonly kh_dkh: number },
): number {
  const alkalinity = kh_dkh * ALKALINITY_MOL_L_PER_DKH
  const co2 = co2_mg_l / CO2_MG_PER_MOL
  // Charges held at this pH against those asked for, as logarithms: nearly a straight line of slope ln 10.
  const excess = (ph: number) => {
    const a = tenTo(-ph)
    return Math.log(basesAt(system, a, co2) / (alkalinity + system.hFactor * a))
  }
  // Bicarbonate alone (a quadratic) puts the pH a little too high, and the excess there tells how much.
  const q = co2 / system.co2Factor
  const high = Math.min(
    14,
    -Math.log10((2 * q) / (alkalinity + Math.sqrt(alkalinity ** 2 + 4 * system.hFactor * q))),
  )
  const near = high - (2 * excess(high)) / Math.LN10 - 1e-9
  return findRoot({ f: excess, low: excess(near) < 0 ? near : 2, high: high + 1e-9, tolerance: 1e-11 })
}

/**
 * The carbonate hardness in dKH at which water of a pH holds an amount of CO2. Closed form.
 *
 * Throws {@link OutOfDomain} when that would be negative: so little CO2 at so low a pH needs a strong acid.
 */
export function khAtCo2(
  system: CarbonateSystem,
  { co2_mg_l, ph }: { readonly co2_mg_l: number; readonly ph: number },
): number {
  const a = tenTo(-ph)
  const alkalinity = basesAt(system, a, co2_mg_l / CO2_MG_PER_MOL) - system.hFactor * a
  if (!(alkalinity > 0)) {
    throw new OutOfDomain(
      "ph",
      `${co2_mg_l} mg/L CO2 alone cannot bring water down to pH ${ph}; another acid must be in it. Measure pH and CO2 again.`,
    )
  }
  return alkalinity / ALKALINITY_MOL_L_PER_DKH
}

/** CO2 in mg/L under a partial pressure of CO2 in atm. @source plummerBusenberg1982, Henry's constant */
export function co2AtPressure(system: CarbonateSystem, pco2_atm: number): number {
  return (pco2_atm / system.pressurePerCo2) * CO2_MG_PER_MOL
}

/** Partial pressure in µatm of an amount of CO2: the inverse of {@link co2AtPressure}. */
export function pco2Uatm(system: CarbonateSystem, co2_mg_l: number): number {
  return (co2_mg_l / CO2_MG_PER_MOL) * system.pressurePerCo2 * 1e6
}

/** Partial pressure in atm of CO2 in air that is saturated with water vapour. `air_co2_ppm` is that of dry air. */
export function airPco2Atm({
  air_co2_ppm,
  temperature_c,
  altitude_m = 0,
}: {
  readonly air_co2_ppm: number
  readonly temperature_c: number
  readonly altitude_m?: number
}): number {
  return air_co2_ppm * 1e-6 * (airPressureAtm(altitude_m) - waterVapourPressureAtm(temperature_c))
}

/** Alkalinity in mol/L that phosphate holds beyond H2PO4-, at the activity `a` of H+. */
export function phosphateAlkalinity(system: CarbonateSystem, a: number): number {
  return (system.phosphate_mol_l * system.k2Phosphate) / (system.k2Phosphate + a)
}

function basesAt(system: CarbonateSystem, a: number, co2: number): number {
  const hco3 = co2 / (system.co2Factor * a)
  return hco3 * (1 + (2 * system.co3Factor) / a) + system.ohFactor / a + phosphateAlkalinity(system, a)
}

function tenTo(exponent: number): number {
  return Math.exp(exponent * Math.LN10)
}
