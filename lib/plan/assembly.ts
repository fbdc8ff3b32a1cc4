import { figures } from "@/lib/units/figures"
import type { PlanFacts } from "./facts"
import { hoseJoints } from "./parts"

/** One step of work, in order. */
export interface Step {
  readonly code: string
  readonly text: string
}

/** How the system is put together: the gas line from the cylinder on, then the water loop, then the mains. */
export function assemblySteps(facts: PlanFacts): Step[] {
  return [...gasLine(facts), ...waterLoop(facts), ...electrics(facts)]
}

function gasLine({ cylinder, working_pressure, bubble_rate, input, method }: PlanFacts): Step[] {
  const device = method.name === "inline_reactor" ? "reactor" : "diffuser"
  const counter = bubble_rate.bubbles_per_s > 4 ? "flow meter" : "bubble counter"
  return [
    step(
      "secure_cylinder",
      `Stand the cylinder (${figures(cylinder.cylinder_mass_g / 1000, 3)} kg of CO2) upright and strap it. Its gauge will show about ${figures(cylinder.pressure_bar_abs, 2)} bar at ${figures(input.ambient_c, 2)} °C.`,
    ),
    step(
      "fit_reducer",
      "Check the seal, screw the reducer to the closed cylinder and tighten it. Turn its screw out until it is loose before you open the cylinder.",
    ),
    step(
      "gas_order",
      `From the reducer on: solenoid, needle valve, ${counter}, check valve, ${device}. The arrow on the check valve points to the ${device}; put it within reach of the water, since pump pressure pushes back through the line when the gas is off.`,
    ),
    step(
      "gas_line",
      `Cut the gas line (${figures(input.line_length_m, 2)} m) square, push it home and tighten each nut. It has to bear ${figures(working_pressure.high_bar, 2)} bar.`,
    ),
  ]
}

function waterLoop(facts: PlanFacts): Step[] {
  const { input, method, reactor_size, flow, elements } = facts
  const joints = hoseJoints(elements)
  const bore = (input.return_hose ?? input.hose).inner_diameter_mm
  const steps: Step[] = []
  if (method.name === "inline_reactor") {
    steps.push(
      step(
        "mount_reactor",
        `Hang the reactor (${figures(reactor_size.body_diameter_mm, 3)} mm bore, ${figures(reactor_size.body_length_mm, 3)} mm long) upright behind the filter, in the ${bore} mm return line: water and gas in at the top, water out at the bottom, the bleed screw in reach. As low as it can hang, since pressure helps the gas dissolve.`,
      ),
    )
    if (reactor_size.bypass_fraction) {
      steps.push(
        step(
          "bypass",
          `Lead ${figures(100 * reactor_size.bypass_fraction, 2)} % of the flow around the reactor with a tee, a valve and a second tee.`,
        ),
      )
    }
  } else if (method.name === "inline_diffuser") {
    steps.push(
      step(
        "mount_diffuser",
        `Put the inline diffuser into the ${bore} mm return line behind the filter, upright, gas connection up, with a metre of hose behind it so that the bubbles can dissolve.`,
      ),
    )
  } else {
    steps.push(
      step(
        "mount_diffuser",
        `Soak the diffuser overnight. Fix it ${figures(100 * input.depth_m, 2)} cm deep, under the stream of the outflow, as far from the surface as it goes.`,
      ),
    )
  }
  steps.push(
    step(
      "clamp_joints",
      `Wet each hose end, push it fully over its barb and clamp it: ${joints} joints, ${joints} clamps. Lay the hose in wide bends without a kink: it takes ${figures(100 * hoseHead(flow), 2)} of the loop's ${figures(100 * flow.head_m, 2)} cm of head now.`,
    ),
  )
  return steps
}

function hoseHead({ head_budget }: PlanFacts["flow"]): number {
  return head_budget
    .filter(({ element }) => element === "hose" || element === "return_hose")
    .reduce((sum, { head_m }) => sum + head_m, 0)
}

function electrics({ dosing, ph }: PlanFacts): Step[] {
  const steps = [
    step(
      "drip_loops",
      "Give every cable a drip loop below its socket, keep sockets above the water line, and plug everything into a circuit with a residual-current device.",
    ),
  ]
  if (dosing.control === "controller") {
    steps.push(
      step(
        "controller",
        `Calibrate the probe at tank temperature and hang it in moving water away from the outflow. Set-point ${ph.ph.toFixed(2)}; let the controller switch the solenoid only from ${figures(dosing.open_before_lights_min, 3)} min before the lights to ${figures(dosing.close_before_lights_off_min, 3)} min before dark.`,
      ),
    )
  } else {
    steps.push(
      step(
        "timer",
        `Plug the solenoid into the timer: on ${figures(dosing.open_before_lights_min, 3)} min before the lights, off ${figures(dosing.close_before_lights_off_min, 3)} min before they go out.`,
      ),
    )
  }
  return steps
}

function step(code: string, text: string): Step {
  return { code, text }
}
