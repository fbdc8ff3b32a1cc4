/**
 * How calm the water's surface is. `strong` is a surface skimmer, a weir or an air stone.
 *
 * @source coleCaraco1998 for calm (2.07 cm/h on a lake without wind). The other three are engineering judgement:
 * believe them to a factor of 2 either way, or measure the tank with `exchangeFromNight`.
 */
export const AGITATION_K600_CM_H = { calm: 2, rippled: 5, agitated: 10, strong: 20 } as const

export type Agitation = keyof typeof AGITATION_K600_CM_H

/** The factor, either way, by which a guessed class may be wrong. */
export const K600_FACTOR = 2

/** Exponent of the Schmidt number. @source jahneExchange1987: 2/3 on a smooth surface, 1/2 on a rippled one */
export function schmidtExponent(agitation: Agitation): number {
  return agitation === "calm" ? 2 / 3 : 1 / 2
}

/** Schmidt number of CO2 in fresh water, -2 to 40 °C; 600.3 at 20 °C. @source wanninkhof2014, table 1 */
export function schmidtNumber(temperature_c: number): number {
  const t = temperature_c
  return 1923.6 + t * (-125.06 + t * (4.3773 + t * (-0.085681 + t * 0.00070284)))
}

/** Gas transfer velocity at the water's temperature, cm/h. @source jahneExchange1987 */
export function transferVelocity(p: {
  readonly k600_cm_h: number
  readonly schmidt_exponent: number
  readonly temperature_c: number
}): number {
  return p.k600_cm_h * (schmidtNumber(p.temperature_c) / 600) ** -p.schmidt_exponent
}

/** Share of its excess CO2 that the tank loses to the air each hour, 1/h: transfer velocity times area by volume. */
export function exchangeRate(p: {
  readonly transfer_velocity_cm_h: number
  readonly surface_area_m2: number
  readonly volume_l: number
}): number {
  return (10 * p.transfer_velocity_cm_h * p.surface_area_m2) / p.volume_l
}

/**
 * The exchange rate, 1/h, measured on the tank itself: CO2 at two moments of one night, gas off, lights off. It
 * replaces surface class, area and volume at once. `null` if CO2 did not fall towards the level at rest.
 */
export function exchangeFromNight(p: {
  readonly start_co2_mg_l: number
  readonly end_co2_mg_l: number
  readonly rest_co2_mg_l: number
  readonly elapsed_h: number
}): number | null {
  const { start_co2_mg_l: start, end_co2_mg_l: end, rest_co2_mg_l: rest } = p
  if (!(start > end && end > rest)) return null
  return Math.log((start - rest) / (end - rest)) / p.elapsed_h
}
