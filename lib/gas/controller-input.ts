import { co2AtPh } from "@/lib/chemistry/carbonate"
import type { ReadingErrors } from "@/lib/chemistry/uncertainty"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import type { Controller } from "./controlled-plant"
import { gasDefaults } from "./defaults"
import { type DaySchedule, leadHours, requireSchedule } from "./feed"
import { type Feed, type FeedInput, resolveFeed } from "./feed-input"
import { phCurve } from "./ph-curve"
import { type PreparedTank, prepareTank, type TankInput, tankPh } from "./tank-input"

export interface ControllerInput
  extends TankInput,
    Omit<DaySchedule, "photoperiod_h">,
    FeedInput,
    Omit<ReadingErrors, "kh_dkh"> {
  readonly lights_on_h: number
  readonly lights_off_h?: number | undefined
  /** Tells when the lights go off if `lights_off_h` does not; both have to agree. */
  readonly photoperiod_h?: number | undefined
  /** Minutes before the lights from which the controller may open the valve. Absent: the lead time of the feed. */
  readonly open_before_lights_min?: number | undefined
  /** Absent: the pH of the target. Given, it replaces the target. */
  readonly setpoint_ph?: number | undefined
  readonly hysteresis_ph: number
  readonly delay_min: number
  readonly probe_lag_min: number
}

/** A day of the controller ready to be simulated. */
export interface PreparedDay {
  readonly tank: PreparedTank
  readonly schedule: DaySchedule
  readonly feed: Feed
  readonly setpoint_ph: number
  readonly controller: Controller
  readonly open_before_lights_min: number
}

/**
 * Resolves light, set-point, feed and gate of a controller's day.
 *
 * Throws `OutOfDomain` on the field to change: hours that contradict, a set-point that the tank holds without gas, a
 * gate longer than the night.
 */
export function prepareDay(input: ControllerInput): PreparedDay {
  const schedule = { ...input, photoperiod_h: photoperiod(input) }
  const tank = atSetpoint(prepareTank(input), input.setpoint_ph)
  requireSchedule(schedule)
  const feed = resolveFeed(tank, input)
  const setpoint_ph = input.setpoint_ph ?? tankPh(tank, tank.target_co2_mg_l)
  const controller = {
    tank: tank.balance,
    feed_mg_min: feed.feed_mg_min,
    off_ph: setpoint_ph,
    on_ph: setpoint_ph + input.hysteresis_ph,
    probe_lag_min: input.probe_lag_min,
    line_lag_min: input.delay_min,
    ph: phCurve(tank.system, tank.kh_dkh),
  }
  const night_min = (24 - schedule.photoperiod_h) * 60
  const open_before_lights_min = input.open_before_lights_min ?? ownLead(tank, schedule, feed, night_min)
  if (open_before_lights_min > night_min) {
    throw new OutOfDomain(
      "open_before_lights_min",
      `There are ${figures(night_min, 4)} min of darkness. The gas cannot open earlier than that.`,
    )
  }
  return { tank, schedule, feed, setpoint_ph, controller, open_before_lights_min }
}

/** The feed's own lead time in whole minutes, or the whole night if it never gets there. */
function ownLead(tank: PreparedTank, schedule: DaySchedule, feed: Feed, night_min: number): number {
  const { balance, target_co2_mg_l } = tank
  const lead_h = leadHours(balance, schedule, { feed_mg_min: feed.feed_mg_min, target_co2_mg_l })
  return lead_h === null ? night_min : Math.min(Math.ceil(lead_h * 60), night_min)
}

function photoperiod({ lights_on_h, lights_off_h, photoperiod_h }: ControllerInput): number {
  if (lights_off_h === undefined) return photoperiod_h ?? gasDefaults.photoperiod_h
  const hours = (lights_off_h - lights_on_h + 24) % 24
  if (photoperiod_h !== undefined && Math.abs(photoperiod_h - hours) > 1e-6) {
    throw new OutOfDomain(
      "photoperiod_h",
      `The lights are on from ${figures(lights_on_h, 4)} to ${figures(lights_off_h, 4)} h, ${figures(hours, 4)} h. Leave the photoperiod out, or make it agree.`,
    )
  }
  const { min, max } = quantities.photoperiod_h
  if (hours >= min && hours <= max) return hours
  throw new OutOfDomain(
    "lights_off_h",
    `From ${figures(lights_on_h, 4)} to ${figures(lights_off_h, 4)} h makes ${figures(hours, 4)} h of light; give ${min} to ${max}.`,
  )
}

/** The tank with the level of a set-point as its target. */
function atSetpoint(tank: PreparedTank, setpoint_ph: number | undefined): PreparedTank {
  if (setpoint_ph === undefined) return tank
  const { kh_dkh, system, rest_co2_mg_l } = tank
  const target_co2_mg_l = withFields({ ph: "setpoint_ph" }, () =>
    co2AtPh(system, { ph: setpoint_ph, kh_dkh }),
  )
  if (target_co2_mg_l > rest_co2_mg_l) return { ...tank, target_co2_mg_l }
  throw new OutOfDomain(
    "setpoint_ph",
    `Without gas this tank rests at ${figures(rest_co2_mg_l, 3)} mg/L, pH ${figures(tankPh(tank, rest_co2_mg_l), 3)}, so the controller would never open. Set it lower.`,
  )
}
