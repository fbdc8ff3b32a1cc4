import { figures } from "@/lib/units/figures"
import type { Step } from "./assembly"
import type { PlanFacts } from "./facts"
import { hoseJoints } from "./parts"

/** How the system is first run: water before gas, gas before livestock's target, each step checked before the next. */
export function commissioningSteps(facts: PlanFacts): Step[] {
  return [...waterFirst(facts), ...gasNext(facts), ...raiseLevel(facts)]
}

function waterFirst({ method, flow, reactor, elements, input, volume_l }: PlanFacts): Step[] {
  const bucket_s = (3600 * BUCKET_L) / flow.flow_l_h
  const steps: Step[] = [
    {
      code: "prime",
      text: `Open every tap, fill filter and hoses by the primer or by suction until no more air comes, then start the pump.${input.lift_m > 0 ? ` The outflow stands ${figures(100 * input.lift_m, 2)} cm above the water, so the primer has to lift it there.` : ""}`,
    },
  ]
  if (method.name === "inline_reactor") {
    steps.push({
      code: "bleed",
      text: "With the pump running and the gas off, open the reactor's bleed screw until only water comes: it has to hang exactly upright. Tilt and tap filter and reactor. Air left inside never dissolves, since the tank's water is full of air already.",
    })
  }
  steps.push(
    {
      code: "leak_check",
      text: `Wipe all ${hoseJoints(elements)} hose joints dry. Feel each with dry paper at once, after an hour and after a day; do not leave the house before the second check.`,
    },
    {
      code: "measure_flow",
      text: `Hold the return into a ${BUCKET_L} L bucket: it should fill in about ${figures(bucket_s, 2)} s (${figures(flow.flow_l_h, 3)} L/h, ${figures(flow.flow_l_h / volume_l, 2)} times the tank an hour). Write the time down: it is what you compare with later.`,
    },
  )
  if (method.name === "inline_reactor") {
    steps.push({
      code: "check_jet",
      text: `At ${figures(reactor.flow_l_h, 3)} L/h the jet in the reactor runs at ${figures(reactor.nozzle_velocity_m_s, 2)} m/s. Below ${figures(reactor.minimum_flow_l_h, 3)} L/h do not turn the gas on: it would gather under the lid.`,
    })
  }
  return steps
}

/** L of a household bucket. */
const BUCKET_L = 5

function gasNext({ working_pressure, bubble_rate, dosing, method }: PlanFacts): Step[] {
  const set = figures(working_pressure.working_pressure_bar, 2)
  return [
    {
      code: "set_pressure",
      text: `Needle valve closed, open the cylinder slowly, then turn the reducer to ${set} bar (${figures(working_pressure.low_bar, 2)} to ${figures(working_pressure.high_bar, 2)} bar are usual for the ${method.label}).`,
    },
    {
      code: "gas_leak_check",
      text: "Brush soapy water on every joint of the gas line, from the cylinder's valve to the check valve: nothing may bubble. Close the cylinder for an hour; the gauge must not fall.",
    },
    {
      code: "set_feed",
      text: `Open the solenoid and then the needle valve by hairs. Full feed is ${figures(dosing.feed_ml_min, 2)} mL/min, about ${figures(bubble_rate.bubbles_per_s, 2)} bubbles a second: collecting 10 mL in a syringe takes ${figures(bubble_rate.syringe_10_ml_s, 2)} s. Begin the first day with a third of it.`,
    },
  ]
}

/** Days over which the level is raised. Common practice, no source. */
const RAISE = [
  { day: 1, share: 1 / 3 },
  { day: 3, share: 1 / 2 },
  { day: 5, share: 3 / 4 },
  { day: 8, share: 1 },
]

function raiseLevel(facts: PlanFacts): Step[] {
  const { co2, ph, dosing } = facts
  return [
    {
      code: "raise_slowly",
      text: `Raise the level over days: ${raisePlan(facts)}. Stay by the tank for the first hours after each step. Fish gasping at the surface or shrimp trying to get out: gas off, aerate, one step back.`,
    },
    {
      code: "confirm_level",
      text:
        dosing.control === "controller"
          ? `A drop checker with 4 dKH should turn green, not yellow, some hours after the lights come on. If it and the pH disagree, believe the one that says more CO2: at pH ${ph.ph.toFixed(2)} the tank may hold ${figures(co2.co2_low_mg_l, 2)} to ${figures(co2.co2_high_mg_l, 2)} mg/L.`
          : `Read a drop checker with 4 dKH in the evening, when CO2 stands highest: it should be green (about ${figures(facts.day.highest_co2_mg_l, 2)} mg/L), never yellow.`,
    },
  ]
}

/** Day by day: the level, and what to set for it. At one KH, CO2 falls tenfold for each pH. */
function raisePlan({ co2, ph, dosing, day }: PlanFacts): string {
  if (dosing.control === "controller") {
    const steps = RAISE.map(({ day: on, share }) => {
      const setpoint = ph.ph - Math.log10(share)
      return `day ${on} ${figures(share * co2.target_co2_mg_l, 2)} mg/L (set-point ${setpoint.toFixed(2)})`
    })
    return steps.join(", ")
  }
  const steps = RAISE.map(
    ({ day: on, share }) => `day ${on} ${figures(share * dosing.feed_ml_min, 2)} mL/min`,
  )
  return `${steps.join(", ")}, which leads to ${figures(day.highest_co2_mg_l, 2)} mg/L in the evening`
}
