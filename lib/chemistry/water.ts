/**
 * Properties of pure water at 0.1 MPa. Salts below 1 g/L change them by less than 0.2 % and are left out.
 *
 * All take the temperature in °C and hold for 0-50 °C; callers check the range once, before they loop.
 */

/**
 * Density, kg/m³.
 *
 * @source kell1975, eq. 16. Within 0.0036 kg/m³ of IAPWS-95 from 0 to 40 °C. Many copies print the denominator
 * with two digits swapped (16.897850e-3), which gives 996.73 instead of 997.045 at 25 °C.
 */
export function waterDensity(temperature_c: number): number {
  const t = temperature_c
  const polynomial =
    999.83952 +
    t * (16.945176 + t * (-7.9870401e-3 + t * (-46.170461e-6 + t * (105.56302e-9 - t * 280.54253e-12))))
  return polynomial / (1 + 16.87985e-3 * t)
}

/**
 * Dynamic viscosity, Pa·s.
 *
 * @source patek2009, eq. 8 (IAPWS SR6-08, 253-383 K). Within 3e-5 of IAPWS R12-08.
 */
export function waterViscosity(temperature_c: number): number {
  const tau = (temperature_c + 273.15) / 300
  return 1e-6 * (280.68 * tau ** -1.9 + 511.45 * tau ** -7.7 + 61.131 * tau ** -19.6 + 0.45903 * tau ** -40)
}

/**
 * Surface tension against its vapour, N/m. Tank water carries surfactants that lower it by a few per cent.
 *
 * @source iapws1976, eq. 1 (IAPWS R1-76, triple point to critical point).
 */
export function surfaceTension(temperature_c: number): number {
  const x = 1 - (temperature_c + 273.15) / 647.096
  return 0.2358 * x ** 1.256 * (1 - 0.625 * x)
}

/**
 * Diffusivity of CO2 in water, m²/s.
 *
 * @source jahne1987, table 2 (0-25 °C, 5 % accuracy; extended here to 40 °C). 1.917e-9 at 25 °C.
 */
export function co2Diffusivity(temperature_c: number): number {
  return 5.019e-6 * Math.exp(-19510 / (8.314462618 * (temperature_c + 273.15)))
}

/** Density in kg/L, the unit of the carbonate equations. See {@link waterDensity}. */
export function waterDensityKgL(temperature_c: number): number {
  return waterDensity(temperature_c) / 1000
}

/**
 * Relative permittivity at 1 atm (1.01325 bar).
 *
 * @source bradleyPitzer1979, eqs 1 and 2. 78.384 at 25 °C; 0.11 % above Malmberg & Maryott 1956.
 */
export function dielectric(temperature_c: number): number {
  const T = temperature_c + 273.15
  const d = 342.79 * Math.exp(-5.0866e-3 * T + 9.469e-7 * T * T)
  const c = -2.0525 + 3115.9 / (T - 182.89)
  const b = -8032.5 + 4.2142e6 / T + 2.1417 * T
  return d + c * Math.log((b + 1.01325) / (b + 1000))
}

/**
 * Vapour pressure over fresh water, atm.
 *
 * @source weissPrice1980, eq. 10 at zero salinity. 0.03125 atm at 25 °C.
 */
export function waterVapourPressureAtm(temperature_c: number): number {
  const t100 = (temperature_c + 273.15) / 100
  return Math.exp(24.4543 - 67.4509 / t100 - 4.8489 * Math.log(t100))
}

/**
 * Mean air pressure at a height above the sea, atm.
 *
 * @source iso2533, eq. 12 of the troposphere: (1 - 0.0065 h/288.15)^5.25588. Weather moves it by about 3 %.
 */
export function airPressureAtm(altitude_m: number): number {
  return (1 - (0.0065 * altitude_m) / 288.15) ** 5.25588
}
