import { type Answer, method } from "@/lib/chemistry/answer"
import { co2AtPh, speciesAtPh } from "@/lib/chemistry/carbonate"
import { MODEL_SIGMA } from "@/lib/chemistry/ionic-strength"
import type { SourceId } from "@/lib/chemistry/sources"
import { type Co2Interval, co2Interval, co2Spread, sensitivities } from "@/lib/chemistry/uncertainty"
import { figures } from "@/lib/units/figures"
import { controlCycle } from "./control-cycle"
import type { PlantState } from "./controlled-plant"
import { controllerCautions } from "./controller-cautions"
import { type ControllerInput, type PreparedDay, prepareDay } from "./controller-input"
import { type ControlledRun, type GasSchedule, simulateController } from "./controller-simulation"
import { dayLevel, periodicDay } from "./day"
import { dayPlan, type Uncontrolled, uncontrolled } from "./feed"
import type { Feed } from "./feed-input"

export interface ClockPoint {
  /** Minute of the day. */
  readonly t_min: number
  readonly co2_mg_l: number
  readonly ph: number
}

export interface ControllerDay extends Feed, Omit<Uncontrolled, "saturated"> {
  readonly duty_fraction: number
  readonly cycles_per_h: number
  readonly ideal_duty_fraction: number
  readonly ideal_cycles_per_h: number
  readonly switches_per_day: number
  readonly valve_open_min: number
  readonly overshoot_mg_l: number
  readonly max_co2_mg_l: number
  /** While holding; `null` unless the controller closed the valve twice. */
  readonly hold_low_co2_mg_l: number | null
  readonly min_ph: number
  readonly daily_use_g_day: number
  readonly setpoint_ph: number
  readonly setpoint_co2_mg_l: number
  readonly open_before_lights_min: number
  readonly close_before_lights_off_min: number
  /** `null` if the feed never brings the probe to the set-point: see the caution `never_reached`. */
  readonly reached_after_min: number | null
  readonly lights_on_co2_mg_l: number
  readonly series: readonly ClockPoint[]
}

export interface ControllerUncertainty {
  readonly max_co2_low_mg_l: number
  readonly max_co2_high_mg_l: number
}

/**
 * A day of a pH controller that is gated by the light: how often the valve moves, how far CO2 overshoots, how much
 * gas is used.
 *
 * Steps of a minute with the probe's lag and the gas held in the line (`simulateController`), repeated until the day
 * is the same every day; beside it the closed form without either. The interval is what the probe, KH and the
 * temperature leave open. Throws `OutOfDomain` on the field to change.
 */
export function controllerDay(input: ControllerInput): Answer<ControllerDay, ControllerUncertainty> {
  const day = prepareDay(input)
  const { tank, schedule, feed, setpoint_ph, controller, open_before_lights_min } = day
  const samples = new Float64Array(1441)
  const run = repeatedDay(day, samples)
  const ideal = idealCycle(day, input.hysteresis_ph)
  const { saturated, ...unthrottled } = uncontrolled(tank, schedule, {
    feed_mg_min: feed.feed_mg_min,
    lead_h: open_before_lights_min / 60,
  })
  const opens_min = input.lights_on_h * 60 - open_before_lights_min
  const interval = heldInterval(day, input, run.max_co2_mg_l)
  const result: ControllerDay = {
    ...holdingOf(run, ideal),
    ideal_duty_fraction: ideal.duty_fraction,
    ideal_cycles_per_h: ideal.cycles_per_h,
    switches_per_day: run.switches,
    valve_open_min: run.open_min,
    overshoot_mg_l: run.first_close_min === null ? 0 : run.max_co2_mg_l - tank.target_co2_mg_l,
    max_co2_mg_l: run.max_co2_mg_l,
    hold_low_co2_mg_l: run.holding?.min_co2_mg_l ?? null,
    min_ph: controller.ph(run.max_co2_mg_l),
    daily_use_g_day: (run.open_min * feed.feed_mg_min) / 1000,
    setpoint_ph,
    setpoint_co2_mg_l: tank.target_co2_mg_l,
    open_before_lights_min,
    close_before_lights_off_min: input.close_before_lights_off_min,
    reached_after_min: run.first_close_min,
    lights_on_co2_mg_l: sampleAt(samples, open_before_lights_min),
    ...feed,
    ...unthrottled,
    series: clockSeries(samples, opens_min, controller.ph),
  }
  return {
    result,
    uncertainty: { max_co2_low_mg_l: interval.co2_low_mg_l, max_co2_high_mg_l: interval.co2_high_mg_l },
    cautions: controllerCautions(tank, result, {
      saturated,
      emptied: run.emptied,
      max_co2_high_mg_l: interval.co2_high_mg_l,
    }),
    assumptions: [
      ...tank.assumptions,
      {
        code: "lags",
        message: `The probe follows the water within ${figures(input.probe_lag_min, 2)} min, and gas held in hose and reactor goes on dissolving for ${figures(input.delay_min, 2)} min after the valve closes (time constants). An old reactor may hold gas for several minutes.`,
      },
      {
        code: "gate",
        message: `The valve may open from ${figures(open_before_lights_min, 4)} min before the lights until ${figures(input.close_before_lights_off_min, 3)} min before they go off.`,
      },
    ],
    method: method("Simulation of the controller over a day", [
      ...new Set<SourceId>([...tank.sources, "engineeringJudgement"]),
    ]),
  }
}

/** Simulates days from the ideal controller's one until a day ends within 0.01 mg/L of where it began. */
function repeatedDay(day: PreparedDay, samples: Float64Array): ControlledRun {
  const { tank, schedule, controller } = day
  const lead_h = day.open_before_lights_min / 60
  const plan = dayPlan(schedule, { ...controller, lead_h, target_co2_mg_l: tank.target_co2_mg_l })
  const co2_mg_l = dayLevel(tank.balance, periodicDay(tank.balance, plan), 0)
  const gas: GasSchedule = {
    duration_min: 1440,
    gas_until_min:
      day.open_before_lights_min + schedule.photoperiod_h * 60 - schedule.close_before_lights_off_min,
    lights_from_min: day.open_before_lights_min,
    lights_until_min: day.open_before_lights_min + schedule.photoperiod_h * 60,
  }
  let state: PlantState = { co2_mg_l, source_mg_l_min: 0, probe_ph: controller.ph(co2_mg_l) }
  for (let count = 0; ; count++) {
    const run = simulateController(controller, gas, state, samples)
    if (count === MOST_DAYS || Math.abs(run.end.co2_mg_l - state.co2_mg_l) < 0.01) return run
    state = run.end
  }
}

/** Enough for any tank that trades a tenth of its excess a day; a tighter one shows its last day. */
const MOST_DAYS = 20

/** What a level may truly be while the controller holds its set-point. */
function heldInterval(
  { tank, setpoint_ph }: PreparedDay,
  input: ControllerInput,
  co2_mg_l: number,
): Co2Interval {
  const water = { ph: setpoint_ph, kh_dkh: tank.kh_dkh }
  const slope = sensitivities(tank.system, water, speciesAtPh(tank.system, water))
  const { sigma_ln } = co2Spread(slope, input, MODEL_SIGMA[tank.ionic.ionic_strength_source])
  return co2Interval(tank.system, co2_mg_l, sigma_ln)
}

interface Cycle {
  readonly duty_fraction: number
  readonly cycles_per_h: number
}

function idealCycle({ tank, controller }: PreparedDay, hysteresis_ph: number): Cycle {
  const ph = controller.off_ph + hysteresis_ph
  const cycle = controlCycle(tank.balance, {
    feed_mg_min: controller.feed_mg_min,
    low_co2_mg_l: co2AtPh(tank.system, { ph, kh_dkh: tank.kh_dkh }),
    high_co2_mg_l: tank.target_co2_mg_l,
    lit: true,
  })
  if (cycle === "always_on") return { duty_fraction: 1, cycles_per_h: 0 }
  if (cycle === "always_off") return { duty_fraction: 0, cycles_per_h: 0 }
  const { duty_fraction, cycles_per_h } = cycle
  return { duty_fraction, cycles_per_h }
}

/** From the full cycles of the day; with fewer than one, open all the time or as in the closed form. */
function holdingOf(run: ControlledRun, ideal: Cycle): Cycle {
  const { holding } = run
  if (holding) {
    return {
      duty_fraction: holding.open_min / holding.minutes,
      cycles_per_h: (60 * holding.cycles) / holding.minutes,
    }
  }
  return run.first_close_min === null ? { duty_fraction: 1, cycles_per_h: 0 } : ideal
}

const SERIES_STEP_MIN = 10

/** The samples, which start when the gas opens, on the clock of the day. */
function clockSeries(samples: Float64Array, opens_min: number, ph: (co2: number) => number): ClockPoint[] {
  const series: ClockPoint[] = []
  for (let t_min = 0; t_min <= 1440; t_min += SERIES_STEP_MIN) {
    const co2_mg_l = sampleAt(samples, (((t_min - opens_min) % 1440) + 1440) % 1440)
    series.push({ t_min, co2_mg_l, ph: ph(co2_mg_l) })
  }
  return series
}

function sampleAt(samples: Float64Array, minute: number): number {
  const i = Math.min(Math.floor(minute), 1439)
  return samples[i]! + (minute - i) * (samples[i + 1]! - samples[i]!)
}
