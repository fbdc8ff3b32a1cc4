import { timeToLevel } from "@/lib/numeric/first-order"

/**
 * A tank as a well-mixed volume: dC/dt = 60 η F/V - k (C - C_air) - U (in light) + R, C in mg/L of free CO2.
 * Alkalinity stays constant while dosing, and carbonate's share is left out: below 0.3 mg/L under pH 8.
 */
export interface TankBalance {
  readonly volume_l: number
  /** k, from `exchangeRate` or `exchangeFromNight`. */
  readonly exchange_per_h: number
  /** C_air: CO2 in equilibrium with the air. */
  readonly air_co2_mg_l: number
  /** U: what the plants take in light. */
  readonly plant_uptake_mg_l_h: number
  /** R: what fish, roots and bacteria give, day and night. */
  readonly respiration_mg_l_h: number
  /** η: share of the gas fed that the water takes. */
  readonly dissolution_efficiency: number
}

/** CO2 that a constant feed leads to in the end, mg/L; in light it may come out negative, which `day` handles. */
export function limitLevel(tank: TankBalance, feed_mg_min: number, lit: boolean): number {
  const supply = (60 * tank.dissolution_efficiency * feed_mg_min) / tank.volume_l + tank.respiration_mg_l_h
  const uptake = lit ? tank.plant_uptake_mg_l_h : 0
  return tank.air_co2_mg_l + (supply - uptake) / tank.exchange_per_h
}

/** Feed that keeps a level, mg/min; negative where the tank stays above it by itself. */
export function holdFeed(tank: TankBalance, co2_mg_l: number, lit: boolean): number {
  const uptake = lit ? tank.plant_uptake_mg_l_h : 0
  const loss = tank.exchange_per_h * (co2_mg_l - tank.air_co2_mg_l) + uptake - tank.respiration_mg_l_h
  return (tank.volume_l * loss) / (60 * tank.dissolution_efficiency)
}

/** Hours that a constant feed takes in the dark from one level up to another, or `null` if it never gets there. */
export function hoursToRise(
  tank: TankBalance,
  rise: { readonly feed_mg_min: number; readonly start_co2_mg_l: number; readonly co2_mg_l: number },
): number | null {
  return timeToLevel({
    start: rise.start_co2_mg_l,
    limit: limitLevel(tank, rise.feed_mg_min, false),
    k: tank.exchange_per_h,
    target: rise.co2_mg_l,
  })
}

/** Feed that lifts a dark tank from one level to another in a given time, mg/min. */
export function feedToRise(
  tank: TankBalance,
  rise: { readonly lead_h: number; readonly start_co2_mg_l: number; readonly co2_mg_l: number },
): number {
  const covered = -Math.expm1(-tank.exchange_per_h * rise.lead_h)
  return holdFeed(tank, rise.start_co2_mg_l + (rise.co2_mg_l - rise.start_co2_mg_l) / covered, false)
}
