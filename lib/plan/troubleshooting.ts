import type { Severity } from "@/lib/chemistry/answer"
import { figures } from "@/lib/units/figures"
import type { PlanFacts } from "./facts"

/** One trouble: how it shows, and what to do, first things first. */
export interface Trouble {
  readonly code: string
  readonly severity: Severity
  readonly symptom: string
  readonly actions: readonly string[]
}

/** The troubles of this system, those that kill first. */
export function troubleshooting(facts: PlanFacts): Trouble[] {
  return [
    gasping(facts),
    ...(facts.method.name === "inline_reactor" ? [noisyReactor(facts)] : [weakBubbles(facts)]),
    bubblesInTank(facts),
    phNotFalling(facts),
    phFallingAtNight(facts),
    phRising(facts),
  ]
}

function gasping({ co2, dosing, demand }: PlanFacts): Trouble {
  return {
    code: "fish_gasping",
    severity: "danger",
    symptom: "Fish gasp at the surface, breathe fast or lie still; shrimp try to leave the water.",
    actions: [
      "Shut the cylinder's valve now.",
      "Stir the surface: raise the outflow out of the water, put in an air stone, open the cover.",
      "Change a third of the water, at the same temperature.",
      `Then find the cause: the tank was to hold ${figures(co2.target_co2_mg_l, 3)} mg/L (${figures(co2.co2_low_mg_l, 2)} to ${figures(co2.co2_high_mg_l, 2)}); with the valve stuck open this feed goes to ${figures(demand.uncontrolled_limit_co2_mg_l, 2)} mg/L. Check solenoid, ${dosing.control === "controller" ? "probe and set-point" : "timer and needle valve"}, and the reducer (a nearly empty cylinder dumps).`,
      "Do not turn the gas on again on the same day; start a step lower.",
    ],
  }
}

function noisyReactor({ reactor, flow, dosing }: PlanFacts): Trouble {
  const clean = `Clean the filter if 5 L take longer than ${figures((3600 * 5) / reactor.minimum_flow_l_h, 2)} s (${figures(reactor.minimum_flow_l_h, 3)} L/h); clean it gave ${figures(flow.clean_flow_l_h, 3)} L/h.`
  const lock =
    reactor.limit === "reached"
      ? `It locks at a clogging of ${figures(reactor.limit_clogging!, 2)} on a scale from 0 clean to 1 blocked.`
      : reactor.limit === "already"
        ? "This loop is too weak for it even when clean: take a stronger filter or another method."
        : "Even blocked media should leave enough flow, so look for a kink, a closed tap or trapped air first."
  return {
    code: "reactor_noisy",
    severity: "warning",
    symptom: "The reactor gurgles or rattles, its water level falls, or the pH rises although gas is fed.",
    actions: [
      "Turn the gas off and bleed the reactor until only water comes.",
      `Time the return into a bucket. ${clean}`,
      `Turn the gas down: a cap of gas under the lid dissolves ${figures(reactor.aged_cap_mg_min, 2)} (old) to ${figures(reactor.fresh_cap_mg_min, 2)} mg/min (fresh), and ${figures(dosing.feed_mg_min, 3)} are fed.`,
      lock,
    ],
  }
}

function weakBubbles({ working_pressure, dosing, method }: PlanFacts): Trouble {
  return {
    code: "no_bubbles",
    severity: "warning",
    symptom: `The ${method.label} gives few, coarse or no bubbles although the solenoid is open.`,
    actions: [
      `Read the reducer: it needs ${figures(working_pressure.working_pressure_bar, 2)} bar.`,
      "Wait: after a night the line has to fill up to pressure again, often for several minutes.",
      "Soak the ceramic clean; blow through the check valve in its direction.",
      `Look for a leak with soapy water between needle valve and ceramic; ${figures(dosing.feed_ml_min, 2)} mL/min should arrive.`,
    ],
  }
}

function bubblesInTank({ method, reactor, reactor_size, dosing }: PlanFacts): Trouble {
  if (method.name !== "inline_reactor") {
    return {
      code: "bubbles_in_tank",
      severity: "info",
      symptom: "Fine bubbles drift through the tank.",
      actions: [
        `With the ${method.label} that is normal. Less of it: finer ceramic, more depth, a longer way of the water.`,
        "A residue of 2 to 3 % of the gas turns into air bubbles and never dissolves; oxygen from the plants looks the same.",
      ],
    }
  }
  return {
    code: "bubbles_in_tank",
    severity: "warning",
    symptom: "A mist of bubbles comes out of the return.",
    actions: [
      "Turn the gas off for an hour. If the mist stays it is air: look for a joint that draws air before the filter.",
      `Compare the flow with ${figures(reactor.maximum_flow_l_h, 3)} L/h, the most that this body holds: above it lead part of the flow around the reactor or throttle the return.`,
      `Feed less than ${figures(dosing.feed_mg_min, 3)} mg/min, or take a body wider than ${figures(reactor_size.body_diameter_mm, 3)} mm.`,
    ],
  }
}

function phNotFalling(facts: PlanFacts): Trouble {
  const { cylinder, bubble_rate, working_pressure, demand, dosing } = facts
  const lost = demand.loss_to_air_g_day / demand.daily_use_g_day
  const check =
    dosing.control === "controller" ? "Calibrate the probe, and look" : "Test the pH again, and look"
  return {
    code: "ph_not_falling",
    severity: "warning",
    symptom: "The gas is on, but the pH does not fall.",
    actions: [
      `Is gas coming? About ${figures(bubble_rate.bubbles_per_s, 2)} bubbles a second at ${figures(working_pressure.working_pressure_bar, 2)} bar; the cylinder's gauge near ${figures(cylinder.pressure_bar_abs, 2)} bar.`,
      `Give it time: ${expected(facts)}.`,
      `${check} at the drop checker.`,
      `Calm the surface: ${figures(100 * lost, 2)} % of the gas leaves through it.`,
      "Test KH: after a water change the same CO2 stands at a higher pH.",
    ],
  }
}

function expected({ dosing, day, lead_time }: PlanFacts): string {
  if (dosing.control === "timer") {
    return `on the timer CO2 stands at ${figures(day.lights_on_co2_mg_l, 2)} mg/L when the lights come on and climbs to ${figures(day.highest_co2_mg_l, 2)} by the evening`
  }
  return lead_time.lead_time_min === null
    ? "this feed does not get there in the dark hours"
    : `it takes ${figures(lead_time.lead_time_min, 2)} min to ${figures(100 * lead_time.reached_fraction, 2)} % of the target`
}

function phFallingAtNight({ dosing, day }: PlanFacts): Trouble {
  const gate = dosing.control === "controller" ? "the controller's light gate" : "the timer"
  return {
    code: "ph_falling_at_night",
    severity: "danger",
    symptom: "The pH goes on falling after the lights are out.",
    actions: [
      "Shut the cylinder: the solenoid does not close, or something opens it at night.",
      `Check ${gate}: the gas has to be off from ${clock(day.gas_closes_h)} to ${clock(day.gas_opens_h)}.`,
      "Listen to the solenoid and look at the counter with the power off: one bubble means dirt in its seat.",
      "Aerate at night. Without gas the pH has to rise until morning; fish, soil and decay alone lower it in a tank that is overstocked or foul.",
    ],
  }
}

function phRising({ day, ph }: PlanFacts): Trouble {
  return {
    code: "ph_rises_by_day",
    severity: "info",
    symptom: "The pH swings from day to night.",
    actions: [
      `A swing from ${day.lowest_ph.toFixed(1)} with gas to ${day.highest_ph.toFixed(1)} in the morning is what this tank should show; at rest in air it stands at ${ph.degassed_ph.toFixed(1)}.`,
      "A much bigger swing means a lower KH than you entered: test it.",
    ],
  }
}

function clock(hours: number): string {
  const minutes = Math.round(hours * 60) % 1440
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, "0")}`
}
