import { type Answer, method } from "@/lib/chemistry/answer"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { holdFeed, type TankBalance } from "./balance"
import { milligramsPerMillilitre } from "./bubble-count"
import { type DayBudget, type DayPhase, dayBudget, periodicDay } from "./day"
import {
  type DaySchedule,
  dayPlan,
  holdOnly,
  rampFeed,
  requireSchedule,
  type Uncontrolled,
  uncontrolled,
} from "./feed"
import { feedCautions, plantsTakeAll } from "./feed-cautions"
import { type PreparedTank, prepareTank, type TankInput, tankPh, withBalance } from "./tank-input"

export interface DemandInput extends TankInput, DaySchedule {
  readonly wished_lead_min: number
}

export interface Demand extends Omit<Uncontrolled, "saturated"> {
  readonly hold_feed_mg_min: number
  readonly hold_feed_ml_min: number
  /** Everything fed in a day: the ramp in the wished lead, then holding until the gas closes. */
  readonly daily_use_g_day: number
  readonly loss_to_air_g_day: number
  readonly plant_uptake_g_day: number
  readonly respiration_g_day: number
  readonly escaped_g_day: number
  /** Feed that reaches the target within the wished lead. */
  readonly ramp_feed_mg_min: number
  readonly ramp_feed_ml_min: number
  readonly ramp_ratio: number
  readonly hold_only_lights_on_co2_mg_l: number
  readonly hold_only_close_co2_mg_l: number
  readonly exchange_per_h: number
  readonly air_co2_mg_l: number
  readonly dissolution_efficiency: number
  readonly target_ph: number
}

export interface DemandUncertainty {
  readonly hold_feed_low_mg_min: number
  readonly hold_feed_high_mg_min: number
  readonly daily_use_low_g_day: number
  readonly daily_use_high_g_day: number
}

/**
 * The gas that a tank needs: feed to hold its target in light, feed to get there in the wished lead, use a day and
 * where it goes.
 *
 * Mass balance of a well-mixed tank, the day repeated until it is the same every day. The interval spans the surface
 * class or the readings behind the exchange, and the dissolution. Throws `OutOfDomain` on the field to change.
 */
export function gasDemand(input: DemandInput): Answer<Demand, DemandUncertainty> {
  const tank = prepareTank(input)
  requireSchedule(input)
  const lead_h = input.wished_lead_min / 60
  if (lead_h + input.photoperiod_h > 24) {
    throw new OutOfDomain(
      "wished_lead_min",
      "Lead and light together are longer than a day. Shorten one of them.",
    )
  }
  const day = heldDay(tank.balance, input)
  const low = heldDay(withBalance(tank, tank.exchange.low, tank.efficiency.high), input)
  const high = heldDay(withBalance(tank, tank.exchange.high, tank.efficiency.low), input)
  const { saturated, ...unthrottled } = uncontrolled(tank, input, { feed_mg_min: day.ramp_mg_min, lead_h })
  const timer = holdOnly(tank, input, lead_h)
  const ramp_ratio = day.ramp_mg_min / day.hold_mg_min
  const ml = milligramsPerMillilitre(input.temperature_c)
  return {
    result: {
      hold_feed_mg_min: day.hold_mg_min,
      hold_feed_ml_min: day.hold_mg_min / ml,
      daily_use_g_day: day.budget.fed_mg / 1000,
      loss_to_air_g_day: day.budget.lost_to_air_mg / 1000,
      plant_uptake_g_day: day.budget.taken_up_mg / 1000,
      respiration_g_day: day.budget.respired_mg / 1000,
      escaped_g_day: day.budget.escaped_mg / 1000,
      ramp_feed_mg_min: day.ramp_mg_min,
      ramp_feed_ml_min: day.ramp_mg_min / ml,
      ramp_ratio,
      ...unthrottled,
      ...timer,
      exchange_per_h: tank.balance.exchange_per_h,
      air_co2_mg_l: tank.balance.air_co2_mg_l,
      dissolution_efficiency: tank.balance.dissolution_efficiency,
      target_ph: tankPh(tank, input.target_co2_mg_l),
    },
    uncertainty: {
      hold_feed_low_mg_min: low.hold_mg_min,
      hold_feed_high_mg_min: high.hold_mg_min,
      daily_use_low_g_day: low.budget.fed_mg / 1000,
      daily_use_high_g_day: high.budget.fed_mg / 1000,
    },
    cautions: [
      ...feedCautions(tank, {
        ...unthrottled,
        ...timer,
        saturated,
        feed_ratio: ramp_ratio,
        lead_min: input.wished_lead_min,
      }),
      ...(day.phases.some(({ course }) => course === "empty") ? [plantsTakeAll] : []),
    ],
    assumptions: demandAssumptions(tank, input),
    method: method("Mass balance of the tank over a day", tank.sources),
  }
}

interface HeldDay {
  readonly hold_mg_min: number
  readonly ramp_mg_min: number
  readonly phases: readonly DayPhase[]
  readonly budget: DayBudget
}

/** The day with the wished lead: the feed it takes, its course, and where the gas goes. */
function heldDay(balance: TankBalance, input: DemandInput): HeldDay {
  const { target_co2_mg_l } = input
  const lead_h = input.wished_lead_min / 60
  const ramp_mg_min = rampFeed(balance, input, { target_co2_mg_l, lead_h })
  const plan = dayPlan(input, { feed_mg_min: ramp_mg_min, lead_h, target_co2_mg_l })
  const phases = periodicDay(balance, plan)
  const hold_mg_min = holdFeed(balance, target_co2_mg_l, true)
  return { hold_mg_min, ramp_mg_min, phases, budget: dayBudget(balance, phases) }
}

function demandAssumptions(tank: PreparedTank, input: DemandInput) {
  return [
    ...tank.assumptions,
    {
      code: "day",
      message: `The gas opens ${figures(input.wished_lead_min, 3)} min before ${figures(input.photoperiod_h, 3)} h of light at the feed for that lead, is then throttled to hold the target, and closes ${figures(input.close_before_lights_off_min, 3)} min before dark. Leaks and purging are not counted: add 10 to 20 %.`,
    },
  ]
}
