import { timeToLevel } from "@/lib/numeric/first-order"
import { limitLevel, type TankBalance } from "./balance"

export interface ControlCycle {
  readonly on_h: number
  readonly off_h: number
  readonly duty_fraction: number
  readonly cycles_per_h: number
}

export interface ControlBand {
  readonly feed_mg_min: number
  /** CO2 at which the valve opens. */
  readonly low_co2_mg_l: number
  /** CO2 at which it closes. */
  readonly high_co2_mg_l: number
  readonly lit: boolean
}

/**
 * The cycle of an on/off valve between two levels, with a probe and a feed that answer at once: the closed form.
 * `always_on` if the feed never reaches the upper level, `always_off` if the tank never falls to the lower one.
 */
export function controlCycle(
  tank: TankBalance,
  band: ControlBand,
): ControlCycle | "always_on" | "always_off" {
  const k = tank.exchange_per_h
  const { low_co2_mg_l: low, high_co2_mg_l: high, lit } = band
  const on_h = timeToLevel({ start: low, limit: limitLevel(tank, band.feed_mg_min, lit), k, target: high })
  if (on_h === null) return "always_on"
  const off_h = timeToLevel({ start: high, limit: limitLevel(tank, 0, lit), k, target: low })
  if (off_h === null) return "always_off"
  return { on_h, off_h, duty_fraction: on_h / (on_h + off_h), cycles_per_h: 1 / (on_h + off_h) }
}
