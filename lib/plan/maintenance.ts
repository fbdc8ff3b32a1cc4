import { figures } from "@/lib/units/figures"
import type { PlanFacts } from "./facts"

/** One chore: when it is due, by a number that can be read off, and what to do. */
export interface Chore {
  readonly code: string
  readonly when: string
  readonly text: string
}

/** What keeps the system at what it was planned for. */
export function maintenancePlan(facts: PlanFacts): Chore[] {
  return [filterChore(facts), ...deviceChores(facts), ...gasChores(facts), ...measuringChores(facts)]
}

function filterChore({ method, flow, reactor, minimum_filter }: PlanFacts): Chore {
  const least = method.name === "inline_reactor" ? reactor.minimum_flow_l_h : minimum_filter.clean_flow_l_h
  // A loop that is too weak from the start is cleaned as soon as it loses a twentieth.
  const limit_l_h = Math.min(Math.max(least, flow.due_flow_l_h), 0.95 * flow.clean_flow_l_h)
  const why =
    method.name === "inline_reactor"
      ? `Below ${figures(reactor.minimum_flow_l_h, 3)} L/h the jet no longer breaks up the gas, and the reactor grows noisy and gas-locks.`
      : "Below that CO2 no longer spreads through the tank."
  const bucket = (flow_l_h: number) => `${figures((3600 * 5) / flow_l_h, 2)} s`
  return {
    code: "clean_filter",
    when: `When the flow has fallen to ${figures(limit_l_h, 3)} L/h: 5 L take ${bucket(limit_l_h)} instead of ${bucket(flow.clean_flow_l_h)}. Time it every month.`,
    text: `Clean the filter's media and the intake strainer, in tank water. ${why}`,
  }
}

function deviceChores({ method, working_pressure }: PlanFacts): Chore[] {
  if (method.name === "inline_reactor") {
    return [
      {
        code: "bleed_reactor",
        when: "After each cleaning of the filter, and whenever the reactor gurgles.",
        text: "Bleed the reactor with the gas off until only water comes. Nitrogen and oxygen gather in it and never dissolve.",
      },
    ]
  }
  return [
    {
      code: "clean_diffuser",
      when: `When the bubbles grow coarse, or more than ${figures(working_pressure.high_bar, 2)} bar are needed; every three to four weeks.`,
      text: "Soak the ceramic in diluted bleach until white, rinse, then in water with dechlorinator overnight.",
    },
  ]
}

/** Days of gas in hand when a refill is ordered. Common practice, no source. */
const RESERVE_DAYS = 14

function gasChores({ cylinder, dosing, input }: PlanFacts): Chore[] {
  const { usable_g, days, liquid_gone_g, cylinder_mass_g, pressure_bar_abs } = cylinder
  const reserve_g = Math.min(RESERVE_DAYS * dosing.daily_use_g_day, usable_g / 2)
  const order_g = reserve_g + cylinder_mass_g - usable_g
  const reads = `${figures(pressure_bar_abs, 2)} bar at ${figures(input.ambient_c, 2)} °C`
  const gauge =
    liquid_gone_g === null
      ? `At this temperature the cylinder holds no liquid: the gauge reads ${reads} when full and falls with every day.`
      : `The gauge tells nothing before the last liquid is gone: it stays near ${reads} until ${figures(liquid_gone_g, 2)} g are left, and once it falls the end is near.`
  return [
    {
      code: "weigh_cylinder",
      when: `Every month; a charge lasts about ${figures(days, 2)} days, ${figures(30 * dosing.daily_use_g_day, 2)} g a month.`,
      text: `Weigh the cylinder and subtract its empty weight: order a refill when ${figures(order_g, 2)} g of CO2 are left: ${figures(reserve_g / dosing.daily_use_g_day, 2)} days of use. ${gauge}`,
    },
    {
      code: "check_gas_line",
      when: "At every change of the cylinder.",
      text: "Brush the joints with soapy water. Blow back through the check valve: it must hold; replace it every two years.",
    },
    {
      code: "cylinder_test",
      when: "By the date stamped on the cylinder: commonly 10 years for steel in Europe, 5 in the United States; local rules decide.",
      text: "Have the cylinder filled and tested only by a licensed filler.",
    },
  ]
}

function measuringChores({ dosing, ph, input }: PlanFacts): Chore[] {
  const kh = `At ${figures(input.kh_dkh, 2)} dKH the set-point is ${ph.ph.toFixed(2)}; one dKH more or less shifts the CO2 that it stands for by ${figures(100 / input.kh_dkh, 2)} %.`
  const drop: Chore = {
    code: "renew_drop_checker",
    when: "Every four weeks.",
    text: "Renew solution and indicator of the drop checker.",
  }
  if (dosing.control === "timer") return [drop]
  return [
    {
      code: "calibrate_probe",
      when: "Every four weeks, and at once when pH and drop checker disagree.",
      text: "Calibrate the probe at tank temperature with fresh pH 7 and pH 4; 0.1 off is a quarter more or less CO2. Replace it after one to two years.",
    },
    { code: "test_kh", when: "Every week, and after each water change.", text: `Test KH. ${kh}` },
    drop,
  ]
}
