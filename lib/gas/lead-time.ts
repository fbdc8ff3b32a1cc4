import { type Answer, type Caution, method } from "@/lib/chemistry/answer"
import { figures } from "@/lib/units/figures"
import { type DayPhase, dayBudget, dayLevel, gasHours, periodicDay } from "./day"
import {
  type DaySchedule,
  dayPlan,
  holdOnly,
  leadHours,
  requireSchedule,
  type Uncontrolled,
  uncontrolled,
} from "./feed"
import { feedCautions, plantsTakeAll } from "./feed-cautions"
import { type Feed, type FeedInput, resolveFeed } from "./feed-input"
import { phCurve } from "./ph-curve"
import { type PreparedTank, prepareTank, type TankInput, tankPh, withBalance } from "./tank-input"

export interface LeadTimeInput extends TankInput, DaySchedule, FeedInput {}

export interface SeriesPoint {
  /** After the gas opens. */
  readonly t_min: number
  readonly co2_mg_l: number
  readonly ph: number
}

export interface LeadTime extends Feed, Omit<Uncontrolled, "saturated"> {
  /** `null` if the feed does not get there in the dark hours: see the caution `never_reached`. */
  readonly lead_time_min: number | null
  /** CO2 at lights-on over the target: the wished share, or what the feed reaches open the whole night. */
  readonly reached_fraction: number
  readonly open_before_lights_min: number | null
  readonly close_before_lights_off_min: number
  readonly start_co2_mg_l: number
  readonly lights_on_co2_mg_l: number
  readonly close_co2_mg_l: number
  readonly lights_off_co2_mg_l: number
  readonly hold_only_lights_on_co2_mg_l: number
  readonly hold_only_close_co2_mg_l: number
  readonly daily_use_g_day: number
  readonly target_ph: number
  readonly exchange_per_h: number
  readonly dissolution_efficiency: number
  /** The day from the moment the gas opens, throttled at the target. */
  readonly series: readonly SeriesPoint[]
}

export interface LeadTimeUncertainty {
  readonly lead_time_low_min: number | null
  /** `null` if a brisker surface or worse dissolution would keep the feed from ever getting there. */
  readonly lead_time_high_min: number | null
}

/**
 * When the gas must open before the lights for a feed to have the tank at its target, day after day.
 *
 * Mass balance in closed form; the level when the gas opens is what the night before left. The same feed is used for
 * the interval, with the exchange and the dissolution at their ends. Throws `OutOfDomain` on the field to change.
 */
export function leadTime(input: LeadTimeInput): Answer<LeadTime, LeadTimeUncertainty> {
  const tank = prepareTank(input)
  requireSchedule(input)
  const feed = resolveFeed(tank, input)
  const wish = { feed_mg_min: feed.feed_mg_min, target_co2_mg_l: input.target_co2_mg_l }
  const lead_h = leadHours(tank.balance, input, wish)
  const shown_h = lead_h ?? 24 - input.photoperiod_h
  const plan = dayPlan(input, { ...wish, lead_h: shown_h })
  const phases = periodicDay(tank.balance, plan)
  const at = (hour: number) => dayLevel(tank.balance, phases, hour)
  const { saturated, ...unthrottled } = uncontrolled(tank, input, { ...feed, lead_h: shown_h })
  const timer = holdOnly(tank, input, shown_h)
  const minutes = (hours: number | null) => (hours === null ? null : hours * 60)
  const bound = (exchange: number, efficiency: number) =>
    minutes(leadHours(withBalance(tank, exchange, efficiency), input, wish))
  return {
    result: {
      lead_time_min: minutes(lead_h),
      reached_fraction: at(shown_h) / input.target_co2_mg_l,
      open_before_lights_min: minutes(lead_h),
      close_before_lights_off_min: input.close_before_lights_off_min,
      ...feed,
      start_co2_mg_l: at(0),
      lights_on_co2_mg_l: at(shown_h),
      close_co2_mg_l: at(gasHours(plan)),
      lights_off_co2_mg_l: at(shown_h + input.photoperiod_h),
      ...unthrottled,
      ...timer,
      daily_use_g_day: dayBudget(tank.balance, phases).fed_mg / 1000,
      target_ph: tankPh(tank, input.target_co2_mg_l),
      exchange_per_h: tank.balance.exchange_per_h,
      dissolution_efficiency: tank.balance.dissolution_efficiency,
      series: daySeries(tank, phases),
    },
    uncertainty: {
      lead_time_low_min: bound(tank.exchange.low, tank.efficiency.high),
      lead_time_high_min: bound(tank.exchange.high, tank.efficiency.low),
    },
    cautions: [
      ...(lead_h === null ? [neverReached(tank, input, at(shown_h))] : []),
      ...feedCautions(tank, { ...unthrottled, ...timer, ...feed, saturated, lead_min: shown_h * 60 }),
      ...(phases.some(({ course }) => course === "empty") ? [plantsTakeAll] : []),
    ],
    assumptions: [
      ...tank.assumptions,
      {
        code: "throttled",
        message: `The feed runs until the tank holds ${figures(input.target_co2_mg_l, 3)} mg/L and is then throttled to hold it; ${figures(100 * input.reach_fraction, 3)} % of that when the lights come on counts as reached. The gas closes ${figures(input.close_before_lights_off_min, 3)} min before dark.`,
      },
    ],
    method: method("Lead time from the mass balance of the tank", tank.sources),
  }
}

const SERIES_STEP_MIN = 15

function daySeries(tank: PreparedTank, phases: readonly DayPhase[]): SeriesPoint[] {
  const ph = phCurve(tank.system, tank.kh_dkh)
  const series: SeriesPoint[] = []
  for (let t_min = 0; t_min <= 1440; t_min += SERIES_STEP_MIN) {
    const co2_mg_l = dayLevel(tank.balance, phases, t_min / 60)
    series.push({ t_min, co2_mg_l, ph: ph(co2_mg_l) })
  }
  return series
}

function neverReached(tank: PreparedTank, input: LeadTimeInput, best: number): Caution {
  const target = figures(input.target_co2_mg_l, 3)
  return {
    code: "never_reached",
    severity: "warning",
    message: `Open the whole night, this feed brings the tank to ${figures(best, 2)} mg/L when the lights come on, not to ${figures(100 * input.reach_fraction, 3)} % of ${target}. Feed more, calm the surface, or dissolve more of the gas (now ${figures(100 * tank.balance.dissolution_efficiency, 2)} %).`,
  }
}
