import { type DayPlan, dayLevel, gasHours, periodicDay } from "@/lib/gas/day"
import { phCurve } from "@/lib/gas/ph-curve"
import type { PreparedTank } from "@/lib/gas/tank-input"

export interface CoursePoint {
  /** Minute of the day by the clock. */
  readonly t_min: number
  readonly co2_mg_l: number
  readonly ph: number
}

/** A day of the tank by the clock, the same every day. Hours from midnight, 0 to 24. */
export interface DayCourse {
  readonly gas_opens_h: number
  readonly lights_on_h: number
  readonly gas_closes_h: number
  readonly lights_off_h: number
  readonly lights_on_co2_mg_l: number
  readonly highest_co2_mg_l: number
  readonly lowest_co2_mg_l: number
  readonly highest_ph: number
  readonly lowest_ph: number
  readonly series: readonly CoursePoint[]
}

/** Minutes between two points of the course. */
const STEP_MIN = 15

/** The course of a day in closed form: gas, light and night, throttled at the target or left to run. */
export function dayCourse(tank: PreparedTank, plan: DayPlan, lights_on_h: number): DayCourse {
  const phases = periodicDay(tank.balance, plan)
  const ph = phCurve(tank.system, tank.kh_dkh)
  const opens_h = lights_on_h - plan.lead_h
  const series: CoursePoint[] = []
  let highest = dayLevel(tank.balance, phases, gasHours(plan))
  let lowest = dayLevel(tank.balance, phases, 0)
  for (let t_min = 0; t_min <= 1440; t_min += STEP_MIN) {
    const co2_mg_l = dayLevel(tank.balance, phases, clock(t_min / 60 - opens_h))
    highest = Math.max(highest, co2_mg_l)
    lowest = Math.min(lowest, co2_mg_l)
    series.push({ t_min, co2_mg_l, ph: ph(co2_mg_l) })
  }
  return {
    gas_opens_h: clock(opens_h),
    lights_on_h: clock(lights_on_h),
    gas_closes_h: clock(opens_h + gasHours(plan)),
    lights_off_h: clock(lights_on_h + plan.photoperiod_h),
    lights_on_co2_mg_l: dayLevel(tank.balance, phases, plan.lead_h),
    highest_co2_mg_l: highest,
    lowest_co2_mg_l: lowest,
    highest_ph: ph(lowest),
    lowest_ph: ph(highest),
    series,
  }
}

function clock(hours: number): number {
  return ((hours % 24) + 24) % 24
}
