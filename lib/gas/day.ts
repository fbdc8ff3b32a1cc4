import { findRoot } from "@/lib/numeric/find-root"
import { levelAfter, levelIntegral, timeToLevel } from "@/lib/numeric/first-order"
import { holdFeed, limitLevel, type TankBalance } from "./balance"

/** A day that starts when the gas opens: gas alone, then light, then light without gas, then night. */
export interface DayPlan {
  readonly feed_mg_min: number
  /** The level at which an ideal controller throttles; `null` leaves the feed running until the gas closes. */
  readonly target_co2_mg_l: number | null
  readonly lead_h: number
  readonly photoperiod_h: number
  readonly close_before_dark_h: number
}

/** A stretch of the day in closed form. Times in hours after the gas opens. */
export interface DayPhase {
  readonly start_h: number
  readonly hours: number
  readonly start_co2_mg_l: number
  readonly end_co2_mg_l: number
  readonly lit: boolean
  readonly feed_mg_min: number
  /**
   * `drift`: towards `limit_co2_mg_l` with the exchange rate. `hold`: the ideal controller gives what is lost.
   * `empty`: no CO2 left, so the plants get no more than comes in.
   */
  readonly course: "drift" | "hold" | "empty"
  readonly limit_co2_mg_l: number
}

/** Hours in which the gas is allowed. */
export function gasHours(plan: DayPlan): number {
  return plan.lead_h + plan.photoperiod_h - plan.close_before_dark_h
}

/** The day from a level at the moment the gas opens. Lead and photoperiod fit into 24 h, the close into both. */
export function dayPhases(tank: TankBalance, plan: DayPlan, start_co2_mg_l: number): DayPhase[] {
  const gasEnd = gasHours(plan)
  const dark = plan.lead_h + plan.photoperiod_h
  const phases: DayPhase[] = []
  let start_h = 0
  let level = start_co2_mg_l
  for (const end_h of [Math.min(plan.lead_h, gasEnd), Math.max(plan.lead_h, gasEnd), dark, 24]) {
    const middle = (start_h + end_h) / 2
    const stretch = { end_h, lit: middle > plan.lead_h && middle < dark, gas: middle < gasEnd }
    level = addPhases(phases, tank, plan, stretch, { start_h, level })
    start_h = end_h
  }
  return phases
}

/** The day that ends where it began, to 1e-10 mg/L: the course of a tank run the same way for many days. */
export function periodicDay(tank: TankBalance, plan: DayPlan): DayPhase[] {
  // A day shrinks differences by e^(-24 k), so the level at its end crosses the level at its start exactly once.
  const gain = (start: number) => dayPhases(tank, plan, start).at(-1)!.end_co2_mg_l - start
  const highest = Math.max(limitLevel(tank, plan.feed_mg_min, false), tank.air_co2_mg_l) + 1
  return dayPhases(tank, plan, findRoot({ f: gain, low: 0, high: highest, tolerance: 1e-10 }))
}

/** CO2 at an hour after the gas opens, mg/L. */
export function dayLevel(tank: TankBalance, phases: readonly DayPhase[], hour: number): number {
  const phase = phases.find((p) => hour <= p.start_h + p.hours) ?? phases.at(-1)!
  if (phase.course === "hold") return phase.start_co2_mg_l
  if (phase.course === "empty") return 0
  return levelAfter({
    start: phase.start_co2_mg_l,
    limit: phase.limit_co2_mg_l,
    k: tank.exchange_per_h,
    time: hour - phase.start_h,
  })
}

/** What came in and went out over the phases, mg. `fed + respired = escaped + lost to air + taken up + stored`. */
export interface DayBudget {
  readonly fed_mg: number
  /** Fed but not dissolved: bubbles that reach the surface. */
  readonly escaped_mg: number
  readonly respired_mg: number
  readonly lost_to_air_mg: number
  readonly taken_up_mg: number
  readonly stored_mg: number
}

export function dayBudget(tank: TankBalance, phases: readonly DayPhase[]): DayBudget {
  const volume = tank.volume_l
  let fed = 0
  let lost = 0
  let taken = 0
  let hours = 0
  for (const phase of phases) {
    const gas = 60 * phase.feed_mg_min * phase.hours
    const loss = volume * tank.exchange_per_h * (levelHours(tank, phase) - tank.air_co2_mg_l * phase.hours)
    const uptake =
      phase.course === "empty"
        ? tank.dissolution_efficiency * gas + volume * tank.respiration_mg_l_h * phase.hours - loss
        : phase.lit
          ? volume * tank.plant_uptake_mg_l_h * phase.hours
          : 0
    fed += gas
    lost += loss
    taken += uptake
    hours += phase.hours
  }
  return {
    fed_mg: fed,
    escaped_mg: fed * (1 - tank.dissolution_efficiency),
    respired_mg: volume * tank.respiration_mg_l_h * hours,
    lost_to_air_mg: lost,
    taken_up_mg: taken,
    stored_mg: volume * (phases.at(-1)!.end_co2_mg_l - phases[0]!.start_co2_mg_l),
  }
}

function levelHours(tank: TankBalance, phase: DayPhase): number {
  if (phase.course === "hold") return phase.start_co2_mg_l * phase.hours
  if (phase.course === "empty") return 0
  return levelIntegral({
    start: phase.start_co2_mg_l,
    limit: phase.limit_co2_mg_l,
    k: tank.exchange_per_h,
    time: phase.hours,
  })
}

/** A part of the day in which light and gas stay as they are. */
interface Stretch {
  readonly end_h: number
  readonly lit: boolean
  readonly gas: boolean
}

/** Adds the phases of a stretch; returns the level at its end. */
function addPhases(
  phases: DayPhase[],
  tank: TankBalance,
  plan: DayPlan,
  stretch: Stretch,
  from: { readonly start_h: number; readonly level: number },
): number {
  let { start_h, level } = from
  while (start_h < stretch.end_h) {
    const left = stretch.end_h - start_h
    const phase = nextPhase(tank, plan, stretch, start_h, level)
    phases.push(phase)
    level = phase.end_co2_mg_l
    // The last phase ends at the stretch's own edge, so that rounding cannot leave a sliver behind.
    start_h = phase.hours < left ? start_h + phase.hours : stretch.end_h
  }
  return level
}

/** The phase that a level starts: until the stretch ends, or until it meets the target or zero. */
function nextPhase(
  tank: TankBalance,
  plan: DayPlan,
  stretch: Stretch,
  start_h: number,
  level: number,
): DayPhase {
  const { lit, gas } = stretch
  const left = stretch.end_h - start_h
  const target = gas ? plan.target_co2_mg_l : null
  const open = limitLevel(tank, gas ? plan.feed_mg_min : 0, lit)
  const closed = gas ? limitLevel(tank, 0, lit) : open
  if (level === target && open >= target && closed <= target) {
    return phaseOf("hold", start_h, left, level, level, lit, holdFeed(tank, target, lit), target)
  }
  const gasOn = gas && (target === null || level < target || (level === target && open < target))
  const limit = gasOn ? open : closed
  const feed = gasOn ? plan.feed_mg_min : 0
  if (level === 0 && limit <= 0) return phaseOf("empty", start_h, left, 0, 0, lit, feed, 0)
  const meetsTarget = target !== null && (target - level) * (limit - target) > 0
  const barrier = meetsTarget ? target : limit < 0 ? 0 : null
  const k = tank.exchange_per_h
  const reach = barrier === null ? null : timeToLevel({ start: level, limit, k, target: barrier })
  if (barrier !== null && reach !== null && reach < left) {
    return phaseOf("drift", start_h, reach, level, barrier, lit, feed, limit)
  }
  const end = levelAfter({ start: level, limit, k, time: left })
  return phaseOf("drift", start_h, left, level, end, lit, feed, limit)
}

// By position, since spreading objects here would take longer than the whole day's arithmetic.
function phaseOf(
  course: DayPhase["course"],
  start_h: number,
  hours: number,
  start_co2_mg_l: number,
  end_co2_mg_l: number,
  lit: boolean,
  feed_mg_min: number,
  limit_co2_mg_l: number,
): DayPhase {
  return { start_h, hours, start_co2_mg_l, end_co2_mg_l, lit, feed_mg_min, course, limit_co2_mg_l }
}
