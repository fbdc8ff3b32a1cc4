import type { Caution } from "@/lib/chemistry/answer"
import { localRules, mainsNearWater, raiseSlowly } from "@/lib/chemistry/cautions"
import { figures } from "@/lib/units/figures"
import type { ControllerDay } from "./controller-day"
import { plantsTakeAll, saturated, tankLivestock, unthrottled } from "./feed-cautions"
import type { PreparedTank } from "./tank-input"

/** What the person must know about a day of the controller. */
export function controllerCautions(
  tank: PreparedTank,
  day: ControllerDay,
  also: { readonly saturated: boolean; readonly emptied: boolean; readonly max_co2_high_mg_l: number },
): Caution[] {
  return [
    unthrottled(day, tank.target_co2_mg_l),
    ...(day.reached_after_min === null ? [neverReached(day)] : [openTime(day, day.reached_after_min)]),
    ...(day.overshoot_mg_l > OVERSHOOT_MG_L ? [overshoot(day)] : []),
    ...(day.cycles_per_h > CYCLES_PER_H ? [fastSwitching(day)] : []),
    ...(also.saturated ? [saturated] : []),
    ...(also.emptied ? [plantsTakeAll] : []),
    tankLivestock(tank, also.max_co2_high_mg_l),
    probeError,
    gate,
    mainsNearWater,
    raiseSlowly,
    localRules,
  ]
}

/** Above these the person should change something. Judgement. */
const OVERSHOOT_MG_L = 3
const CYCLES_PER_H = 6

function neverReached(day: ControllerDay): Caution {
  return {
    code: "never_reached",
    severity: "warning",
    message: `The feed of ${figures(day.feed_mg_min, 3)} mg/min never brings the probe to the set-point: CO2 peaks at ${figures(day.max_co2_mg_l, 2)} mg/L and the valve stays open for all ${figures(day.valve_open_min, 3)} min. Feed more, or open earlier.`,
  }
}

/** A stretch of open valve beyond this multiple of the longest one expected means that something is wrong. */
const OPEN_TIME_MARGIN = 1.5

function openTime(day: ControllerDay, reached_after_min: number): Caution {
  const limit = Math.ceil((OPEN_TIME_MARGIN * reached_after_min) / 10) * 10
  return {
    code: "limit_open_time",
    severity: "warning",
    message: `Limit how long the valve may stay open at a stretch to ${limit} min: the longest stretch expected is ${figures(reached_after_min, 2)} min, and a probe that fails or falls dry would let ${figures(day.uncontrolled_co2_mg_l, 2)} mg/L build up by the evening.`,
  }
}

function overshoot(day: ControllerDay): Caution {
  return {
    code: "overshoot",
    severity: "warning",
    message: `CO2 rises ${figures(day.overshoot_mg_l, 2)} mg/L above the set-point, since probe and held gas lag behind a strong feed. Feed less, place the probe in moving water, or set the controller a little higher.`,
  }
}

function fastSwitching(day: ControllerDay): Caution {
  return {
    code: "fast_switching",
    severity: "warning",
    message: `The valve would open ${figures(day.cycles_per_h, 2)} times an hour, which wears the solenoid. Widen the hysteresis or feed less.`,
  }
}

const probeError: Caution = {
  code: "probe_error",
  severity: "warning",
  message:
    "The controller holds what its probe reads. A probe that is off by 0.1 changes CO2 by 26 %, by 0.3 it doubles or halves it: calibrate at tank temperature every month, and check with a drop checker.",
}

const gate: Caution = {
  code: "gate_by_light",
  severity: "warning",
  message:
    "At night the pH rises and a controller would dose until morning: switch its solenoid with the light's timer. The coil gets warm while the valve is open; leave it room to cool.",
}
