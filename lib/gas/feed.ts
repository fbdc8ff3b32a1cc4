import { co2AtPressure } from "@/lib/chemistry/carbonate"
import { waterVapourPressureAtm } from "@/lib/chemistry/water"
import { findRoot } from "@/lib/numeric/find-root"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { feedToRise, holdFeed, limitLevel, type TankBalance } from "./balance"
import { type DayPlan, dayLevel, gasHours, periodicDay } from "./day"
import type { PreparedTank } from "./tank-input"

/** When light and gas go off, and what counts as reached. */
export interface DaySchedule {
  readonly photoperiod_h: number
  readonly close_before_lights_off_min: number
  readonly reach_fraction: number
}

/** Throws `OutOfDomain` unless the gas closes after the lights come on. */
export function requireSchedule({ photoperiod_h, close_before_lights_off_min }: DaySchedule): void {
  if (close_before_lights_off_min < photoperiod_h * 60) return
  throw new OutOfDomain(
    "close_before_lights_off_min",
    `The lights are on for ${figures(photoperiod_h * 60, 4)} min, so the gas would close before they come on. Give less.`,
  )
}

/** The day of a feed that opens `lead_h` before the lights; `target_co2_mg_l` null leaves it unthrottled. */
export function dayPlan(
  schedule: DaySchedule,
  day: { readonly feed_mg_min: number; readonly lead_h: number; readonly target_co2_mg_l: number | null },
): DayPlan {
  const close_before_dark_h = schedule.close_before_lights_off_min / 60
  return { ...day, photoperiod_h: schedule.photoperiod_h, close_before_dark_h }
}

/**
 * The feed that brings the tank to the wished share of the target in a lead, day after day, mg/min: at least the hold
 * feed, since less could not keep what it reached.
 */
export function rampFeed(
  balance: TankBalance,
  schedule: DaySchedule,
  { target_co2_mg_l, lead_h }: { readonly target_co2_mg_l: number; readonly lead_h: number },
): number {
  const hold = holdFeed(balance, target_co2_mg_l, true)
  const reach = schedule.reach_fraction * target_co2_mg_l
  const short = (feed_mg_min: number) => {
    const plan = dayPlan(schedule, { feed_mg_min, lead_h, target_co2_mg_l })
    return dayLevel(balance, periodicDay(balance, plan), lead_h) - reach
  }
  if (short(hold) >= 0) return hold
  const fromNothing = feedToRise(balance, { lead_h, start_co2_mg_l: 0, co2_mg_l: reach })
  return findRoot({ f: short, low: hold, high: Math.max(fromNothing, hold), tolerance: 1e-9 * fromNothing })
}

/** Hours before the lights that the gas must open for the wished share of the target; `null` if the night is too short. */
export function leadHours(
  balance: TankBalance,
  schedule: DaySchedule,
  wish: { readonly feed_mg_min: number; readonly target_co2_mg_l: number },
): number | null {
  const { feed_mg_min, target_co2_mg_l } = wish
  const short = (lead_h: number) => {
    const plan = dayPlan(schedule, { feed_mg_min, lead_h, target_co2_mg_l })
    return dayLevel(balance, periodicDay(balance, plan), lead_h) - schedule.reach_fraction * target_co2_mg_l
  }
  const night = 24 - schedule.photoperiod_h
  if (short(0) >= 0) return 0
  if (short(night) < 0) return null
  return findRoot({ f: short, low: 0, high: night, tolerance: 1e-9 })
}

/** What a feed does when nothing throttles it. */
export interface Uncontrolled {
  /** CO2 when the gas closes in the evening, on a timer. */
  readonly uncontrolled_co2_mg_l: number
  /** CO2 in the end if the gas never closes. */
  readonly uncontrolled_limit_co2_mg_l: number
  /** True if one of the two was cut to what water holds under pure CO2. */
  readonly saturated: boolean
}

export function uncontrolled(
  tank: PreparedTank,
  schedule: DaySchedule,
  { feed_mg_min, lead_h }: { readonly feed_mg_min: number; readonly lead_h: number },
): Uncontrolled {
  const { balance, system } = tank
  const plan = dayPlan(schedule, { feed_mg_min, lead_h, target_co2_mg_l: null })
  const evening = dayLevel(balance, periodicDay(balance, plan), gasHours(plan))
  const limit = limitLevel(balance, feed_mg_min, false)
  const most = co2AtPressure(system, 1 - waterVapourPressureAtm(system.temperature_c))
  return {
    uncontrolled_co2_mg_l: Math.min(evening, most),
    uncontrolled_limit_co2_mg_l: Math.min(limit, most),
    saturated: limit > most,
  }
}

/** What the hold feed alone reaches on a timer that opens it `lead_h` before the lights. */
export function holdOnly(
  tank: PreparedTank,
  schedule: DaySchedule,
  lead_h: number,
): { readonly hold_only_lights_on_co2_mg_l: number; readonly hold_only_close_co2_mg_l: number } {
  const { balance, target_co2_mg_l } = tank
  const feed_mg_min = holdFeed(balance, target_co2_mg_l, true)
  const plan = dayPlan(schedule, { feed_mg_min, lead_h, target_co2_mg_l: null })
  const phases = periodicDay(balance, plan)
  return {
    hold_only_lights_on_co2_mg_l: dayLevel(balance, phases, lead_h),
    hold_only_close_co2_mg_l: dayLevel(balance, phases, gasHours(plan)),
  }
}
