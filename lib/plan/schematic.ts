import { type ElementKind, elementTable } from "@/lib/flow/elements"
import type { QuantityName } from "@/lib/units/quantities"
import type { PlanFacts } from "./facts"

/** A number where it physically belongs; its unit is that of the quantity. */
export interface SchematicValue {
  readonly quantity: QuantityName
  readonly value: number
  /** What exactly it is of, where the quantity's name does not say it. */
  readonly of?: string
}

export interface SchematicNode {
  readonly id: string
  readonly kind: NodeKind
  readonly label: string
  readonly values: readonly SchematicValue[]
}

export type NodeKind =
  | "cylinder"
  | "reducer"
  | "solenoid"
  | "check_valve"
  | "tank"
  | "filter"
  | "reactor"
  | "inline_diffuser"
  | "diffuser"
  | "return"

export interface SchematicEdge {
  readonly from: string
  readonly to: string
  readonly medium: "gas" | "water"
  readonly values: readonly SchematicValue[]
}

export interface Schematic {
  readonly nodes: readonly SchematicNode[]
  readonly edges: readonly SchematicEdge[]
}

/** The gas train and the water loop as a graph, with each number at the part that it belongs to. */
export function schematic(facts: PlanFacts): Schematic {
  const device = deviceNode(facts)
  return {
    nodes: [...gasNodes(facts), tankNode(facts), filterNode(facts), device, returnNode(facts)],
    edges: [...gasEdges(facts, device.id), ...waterEdges(facts, device)],
  }
}

function gasNodes({ cylinder, working_pressure, dosing, bubble_rate }: PlanFacts): SchematicNode[] {
  return [
    node("cylinder", "Cylinder", [
      value("cylinder_mass_g", cylinder.cylinder_mass_g),
      value("pressure_bar_abs", cylinder.pressure_bar_abs),
      value("days", cylinder.days),
    ]),
    node("reducer", "Reducer", [value("working_pressure_bar", working_pressure.working_pressure_bar)]),
    node(
      "solenoid",
      dosing.control === "controller" ? "Solenoid on the controller" : "Solenoid on the timer",
      [
        value("open_before_lights_min", dosing.open_before_lights_min),
        value("close_before_lights_off_min", dosing.close_before_lights_off_min),
      ],
    ),
    node("check_valve", "Check valve", [
      value("bubbles_per_s", bubble_rate.bubbles_per_s),
      value("feed_mg_min", dosing.feed_mg_min),
    ]),
  ]
}

function tankNode({ volume_l, co2, ph, day }: PlanFacts): SchematicNode {
  return node("tank", "Tank", [
    value("volume_l", volume_l),
    value("co2_mg_l", co2.target_co2_mg_l),
    value("ph", ph.ph),
    value("co2_mg_l", day.lights_on_co2_mg_l, "lights on"),
  ])
}

function filterNode({ flow }: PlanFacts): SchematicNode {
  return node("filter", "Filter", [
    value("flow_l_h", flow.flow_l_h),
    value("head_m", flow.head_m, "pump"),
    ...headOf(flow.head_budget, (element) => element === "media"),
    value("turnover_per_h", flow.turnover_per_h ?? 0),
  ])
}

function deviceNode({ method, flow, reactor, reactor_size, working_pressure }: PlanFacts): SchematicNode {
  if (method.name === "inline_reactor") {
    return node("reactor", "Reactor", [
      value("body_diameter_mm", reactor_size.body_diameter_mm),
      value("body_velocity_m_s", reactor.body_velocity_m_s),
      value("outlet_co2_mg_l", reactor.outlet_co2_mg_l),
      ...headOf(flow.head_budget, (element) => element.startsWith("reactor")),
    ])
  }
  const pressure = value("element_bar", working_pressure.element_bar)
  if (method.name === "diffuser") return node("diffuser", "Diffuser in the tank", [pressure])
  const heads = headOf(flow.head_budget, (element) => element === "inline_diffuser")
  return node("inline_diffuser", "Inline diffuser", [pressure, ...heads])
}

const OUTFLOWS = ["lily_outflow", "spray_bar", "exit", "lift"]

function returnNode({ flow }: PlanFacts): SchematicNode {
  return node("return", "Return", [
    value("flow_l_h", flow.flow_l_h),
    ...headOf(flow.head_budget, (element) => OUTFLOWS.includes(element)),
  ])
}

function gasEdges({ working_pressure, input }: PlanFacts, device: string): SchematicEdge[] {
  const line = [value("line_length_m", input.line_length_m), value("line_bar", working_pressure.line_bar)]
  return [
    edge("cylinder", "reducer", "gas", []),
    edge("reducer", "solenoid", "gas", []),
    edge("solenoid", "check_valve", "gas", line),
    edge("check_valve", device, "gas", [value("check_valve_bar", working_pressure.check_valve_bar)]),
  ]
}

/** Suction from the tank to the filter, pressure side back to it; a device in the line stands between the two. */
function waterEdges({ flow, elements }: PlanFacts, { id, kind }: SchematicNode): SchematicEdge[] {
  const [suction, pressureSide = suction] = flow.hoses
  const hose = (run: typeof suction) =>
    run === undefined
      ? []
      : [
          value("velocity_m_s", run.velocity_m_s),
          value("reynolds", run.reynolds),
          ...headOf(flow.head_budget, (element) => element === run.hose),
        ]
  const shown = new Set(["media", "hose", "return_hose", "inline_diffuser", ...OUTFLOWS])
  const fittings = elements
    .map(({ kind: element }) => element)
    .filter((element) => !shown.has(element) && !element.startsWith("reactor"))
  const losses = headOf(flow.head_budget, (element) => fittings.some((fitting) => fitting === element))
  const back =
    kind === "diffuser"
      ? [edge("filter", "return", "water", hose(pressureSide)), edge(id, "tank", "gas", [])]
      : [edge("filter", id, "water", hose(pressureSide)), edge(id, "return", "water", [])]
  return [
    edge("tank", "filter", "water", [...(suction === pressureSide ? [] : hose(suction)), ...losses]),
    ...back,
    edge("return", "tank", "water", [value("flow_l_h", flow.flow_l_h)]),
  ]
}

function headOf(
  budget: PlanFacts["flow"]["head_budget"],
  which: (element: string) => boolean,
): SchematicValue[] {
  return budget
    .filter(({ element }) => which(element))
    .map(({ element, head_m }) => value("head_m", head_m, labelOf(element)))
}

function labelOf(element: string): string {
  return element in elementTable
    ? elementTable[element as ElementKind].label.toLowerCase()
    : element.replace("_", " ")
}

function node(kind: NodeKind, label: string, values: readonly SchematicValue[]): SchematicNode {
  return { id: kind, kind, label, values }
}

function edge(
  from: string,
  to: string,
  medium: SchematicEdge["medium"],
  values: readonly SchematicValue[],
): SchematicEdge {
  return { from, to, medium, values }
}

function value(quantity: QuantityName, number: number, of?: string): SchematicValue {
  return of === undefined ? { quantity, value: number } : { quantity, value: number, of }
}
