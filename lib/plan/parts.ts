import type { ElementInput, ElementKind } from "@/lib/flow/elements"
import { isAdvertised } from "@/lib/flow/loop-input"
import { LIMITS_PPM } from "@/lib/gas/room-safety"
import { figures } from "@/lib/units/figures"
import type { PlanFacts } from "./facts"

/** One line of the shopping list: what, how many, and the numbers that a buyer has to ask for. */
export interface Part {
  readonly part: string
  readonly count: number
  /** What to ask for, with its numbers. */
  readonly requirement: string
  readonly reason: string
}

/** Hose ends on each kind of element: each is a joint that can leak and wants a clamp. */
const HOSE_ENDS: Readonly<Partial<Record<ElementKind, number>>> = {
  barb: 1,
  quick_release: 2,
  elbow: 2,
  heater: 2,
  uv: 2,
  inline_diffuser: 2,
  reactor: 2,
  reactor_with_internals: 2,
}

/** Joints of hose in the loop as planned. */
export function hoseJoints(elements: readonly ElementInput[]): number {
  return elements.reduce((sum, { kind, count = 1 }) => sum + count * (HOSE_ENDS[kind] ?? 0), 0)
}

/** Everything that the system is built from, the gas line first. */
export function partsList(facts: PlanFacts): Part[] {
  return [...gasParts(facts), ...controlParts(facts), ...waterParts(facts), ...safetyParts(facts)]
}

function gasParts(facts: PlanFacts): Part[] {
  const { cylinder, working_pressure, bubble_rate, dosing, input } = facts
  const { working_pressure_bar, low_bar, high_bar } = working_pressure
  const days = figures(cylinder.days, 2)
  const streams = bubble_rate.bubbles_per_s > COUNTABLE_PER_S
  const line = `${input.line_diameter_mm} mm inside`
  return [
    part(
      "cylinder",
      1,
      `CO2 cylinder of ${figures(cylinder.cylinder_mass_g / 1000, 3)} kg, filled to no more than ${cylinder.max_fill_ratio_kg_l} kg/L, with a pressure relief device`,
      `At ${figures(dosing.daily_use_g_day, 2)} g a day a charge lasts ${days} days.`,
    ),
    part(
      "reducer",
      1,
      `Reducer that holds ${figures(working_pressure_bar, 2)} bar (range ${figures(low_bar, 2)} to ${figures(high_bar, 2)}), better two-stage, with the thread of your cylinder's valve`,
      "A single stage lets its outlet rise when the cylinder runs empty, and dumps gas into the tank.",
    ),
    part(
      "solenoid",
      1,
      `Solenoid, closed without power, for at least ${figures(working_pressure_bar, 2)} bar`,
      `It opens ${figures(dosing.open_before_lights_min, 3)} min before the lights.`,
    ),
    part(
      "needle_valve",
      1,
      `Needle valve that meters ${figures(dosing.feed_ml_min, 2)} mL/min of gas steadily`,
      "It sets the feed; everything behind it stands at the back-pressure of the water.",
    ),
    streams
      ? part(
          "flow_meter",
          1,
          `Flow meter for gas around ${figures(dosing.feed_ml_min, 2)} mL/min`,
          `${figures(bubble_rate.bubbles_per_s, 2)} bubbles a second are a stream that nobody can count.`,
        )
      : part(
          "bubble_counter",
          1,
          `Bubble counter with a tube of ${input.outlet_diameter_mm} mm`,
          `Start at ${figures(bubble_rate.bubbles_per_s, 2)} bubbles a second.`,
        ),
    part(
      "check_valve",
      1,
      `Check valve that opens at no more than ${figures(input.check_valve_bar, 2)} bar, for CO2`,
      "Without gas, pump pressure and siphon push water back to solenoid and reducer.",
    ),
    part(
      "gas_line",
      1,
      `${figures(input.line_length_m, 2)} m of CO2 hose, ${line}, rated for at least ${figures(Math.max(4, 2 * working_pressure_bar), 2)} bar`,
      "Silicone lets CO2 through its wall; use polyurethane or CO2-tight hose.",
    ),
    devicePart(facts),
    part(
      "drop_checker",
      1,
      "Drop checker with 4 dKH reference solution",
      `It shows CO2 apart from pH and KH; this tank is to hold ${figures(input.target_co2_mg_l, 3)} mg/L.`,
    ),
  ]
}

/** Bubbles a second that an eye still counts. Common practice, no source. */
const COUNTABLE_PER_S = 4

function devicePart({
  method,
  reactor_size,
  flow,
  working_pressure,
  dosing,
  input,
  volume_l,
}: PlanFacts): Part {
  if (method.name === "inline_reactor") {
    const { body_diameter_mm, body_length_mm, bypass_fraction } = reactor_size
    const bypass = bypass_fraction
      ? `, on a bypass that leads ${figures(100 * bypass_fraction, 2)} % of the flow around it`
      : ""
    return part(
      "reactor",
      1,
      `Reactor of at least ${figures(body_diameter_mm, 3)} mm bore and ${figures(body_length_mm, 3)} mm free length for ${returnBore(input)} mm hose${bypass}, with a bleed screw`,
      `${figures(flow.flow_l_h, 3)} L/h pass through the loop with it, and it dissolves ${figures(dosing.feed_mg_min, 3)} mg/min.`,
    )
  }
  const pressure = `that works at ${figures(working_pressure.working_pressure_bar, 2)} bar`
  return method.name === "inline_diffuser"
    ? part(
        "inline_diffuser",
        1,
        `Inline diffuser for ${returnBore(input)} mm hose ${pressure}`,
        `Its mist rides on ${figures(flow.flow_l_h, 3)} L/h into the tank.`,
      )
    : part(
        "diffuser",
        1,
        `Ceramic diffuser for ${figures(volume_l, 3)} L ${pressure}`,
        `It makes the bubbles of ${figures(dosing.feed_ml_min, 2)} mL/min fine enough to dissolve on their way up.`,
      )
}

/** A controller or a timer: whichever closes the valve. Never both. */
function controlParts({ dosing, ph, input }: PlanFacts): Part[] {
  if (dosing.control === "timer") {
    return [
      part("timer", 1, "Timer for the solenoid, with a battery that keeps its time", dosing.control_reason),
    ]
  }
  return [
    part(
      "ph_controller",
      1,
      `pH controller with a light gate, set-point ${ph.ph.toFixed(2)}, and probe with calibration solutions of pH 7 and 4`,
      dosing.control_reason,
    ),
    part(
      "kh_test",
      1,
      `Drop test for KH with steps of ${input.kh_error_dkh} dKH or finer`,
      "The set-point holds for this KH only.",
    ),
  ]
}

function waterParts(facts: PlanFacts): Part[] {
  const { input, minimum_filter, flow } = facts
  const { hose, return_hose, pump } = input
  const joints = hoseJoints(facts.elements)
  const advertised = isAdvertised(pump) ? ` (yours: ${pump.max_flow_l_h} L/h, ${pump.max_head_m} m)` : ""
  const { max_flow_l_h, max_head_m } = minimum_filter
  const filter =
    max_flow_l_h === null || max_head_m === null
      ? `No canister filter moves ${figures(minimum_filter.clean_flow_l_h, 3)} L/h through this loop: use wider hose first`
      : `Canister filter advertised with at least ${figures(max_flow_l_h, 2)} L/h and ${figures(max_head_m, 2)} m${advertised}`
  const runs = return_hose ? [hose, return_hose] : [hose]
  return [
    part(
      "filter",
      1,
      filter,
      `The loop has to move ${figures(minimum_filter.clean_flow_l_h, 3)} L/h; it moves ${figures(flow.flow_l_h, 3)}.`,
    ),
    ...runs.map((run) =>
      part(
        "hose",
        1,
        `${figures(run.length_m, 3)} m of smooth hose, ${run.inner_diameter_mm} mm inside`,
        `${run.inner_diameter_mm} mm is what the losses were computed for; a narrower one costs flow.`,
      ),
    ),
    part(
      "hose_clamp",
      joints,
      `${joints} stainless clamps for hose of ${runs.map((run) => run.inner_diameter_mm).join(" and ")} mm bore`,
      `The loop has ${joints} hose joints, and each one that slips empties the tank.`,
    ),
  ]
}

function safetyParts({ room_safety, cylinder, method }: PlanFacts): Part[] {
  const parts = [
    part(
      "cylinder_strap",
      1,
      "Strap or bracket that keeps the cylinder upright",
      "A falling cylinder breaks its valve.",
    ),
    part(
      "residual_current_device",
      1,
      "Residual-current device, 30 mA, and drip loops on every cable",
      "Mains equipment stands near water.",
    ),
  ]
  if (method.name === "inline_reactor") {
    parts.push(
      part(
        "reactor_bracket",
        1,
        "Bracket that holds the reactor upright",
        "Only upright does it hold its bubbles.",
      ),
    )
  }
  if (room_safety.peak_ppm >= LIMITS_PPM.working_day) {
    parts.push(
      part(
        "co2_alarm",
        1,
        `CO2 alarm for ${LIMITS_PPM.working_day} ppm, mounted low`,
        `If all ${figures(cylinder.cylinder_mass_g, 3)} g escape, ${figures(room_safety.room_volume_m3, 2)} m³ of room hold ${figures(room_safety.peak_ppm, 2)} ppm.`,
      ),
    )
  }
  return parts
}

function returnBore({ hose, return_hose }: PlanFacts["input"]): number {
  return (return_hose ?? hose).inner_diameter_mm
}

function part(name: string, count: number, requirement: string, reason: string): Part {
  return { part: name, count, requirement, reason }
}
