/**
 * Equilibrium constants of the carbonate system in pure water at 1 atm (ionic strength 0, molal activities).
 *
 * All take the temperature in °C and hold for 0-50 °C; callers check the range once, before they loop.
 * `logK1` is a base-10 logarithm. The polynomials are log K = A + B·T + C/T + D·log T + E/T² in kelvin.
 */

/** CO2 + H2O = H+ + HCO3-. @source plummerBusenberg1982, table 1 */
export function logK1(temperature_c: number): number {
  const T = temperature_c + 273.15
  return -356.3094 - 0.06091964 * T + 21834.37 / T + 126.8339 * Math.log10(T) - 1684915 / (T * T)
}

/** HCO3- = H+ + CO3--. @source plummerBusenberg1982, table 1 */
export function logK2(temperature_c: number): number {
  const T = temperature_c + 273.15
  return -107.8871 - 0.03252849 * T + 5151.79 / T + 38.92561 * Math.log10(T) - 563713.9 / (T * T)
}

/** CO2(g) = CO2(aq), mol kg⁻¹ atm⁻¹. @source plummerBusenberg1982, table 1 */
export function logHenry(temperature_c: number): number {
  const T = temperature_c + 273.15
  return 108.3865 + 0.01985076 * T - 6919.53 / T - 40.45154 * Math.log10(T) + 669365 / (T * T)
}

/**
 * H2O = H+ + OH-.
 *
 * @source millero1995, eq. 63 at zero salinity. Within 0.003 of Harned & Robinson 1940. A variant that starts with
 * 148.96502 belongs to the total scale of sea water and is 1.5 % low here.
 */
export function logKw(temperature_c: number): number {
  const T = temperature_c + 273.15
  return (148.9802 - 13847.26 / T - 23.6521 * Math.log(T)) * Math.LOG10E
}

/**
 * H2PO4- = H+ + HPO4--: 25 °C value (19.553 - 12.346) and the heat of reaction (4.52 - 3.53 kcal/mol) by van't Hoff.
 *
 * @source ballNordstrom1991, table of thermodynamic data
 */
export function logK2Phosphate(temperature_c: number): number {
  const T = temperature_c + 273.15
  const heat = (0.99 * 4184) / (8.31446 * Math.LN10)
  return -7.207 - heat * (1 / T - 1 / 298.15)
}

/** d(log K1)/dT per kelvin: the slope of {@link logK1}. @source plummerBusenberg1982, table 1 */
export function logK1Slope(temperature_c: number): number {
  const T = temperature_c + 273.15
  return -0.06091964 - 21834.37 / (T * T) + 126.8339 / (T * Math.LN10) + (2 * 1684915) / (T * T * T)
}

/** d(log KH)/dT per kelvin: the slope of {@link logHenry}. @source plummerBusenberg1982, table 1 */
export function logHenrySlope(temperature_c: number): number {
  const T = temperature_c + 273.15
  return 0.01985076 + 6919.53 / (T * T) - 40.45154 / (T * Math.LN10) - (2 * 669365) / (T * T * T)
}
