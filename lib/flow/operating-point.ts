import type { Answer, Assumption, Caution } from "@/lib/chemistry/answer"
import { method } from "@/lib/chemistry/answer"
import type { SourceId } from "@/lib/chemistry/sources"
import { figures } from "@/lib/units/figures"
import { elementTable } from "./elements"
import { type Regime, regimeOf } from "./friction"
import { boreArea, hoseHead, type Loop, loopHead, quadraticOf, reynoldsIn, solveFlow } from "./loop"
import {
  flowAt,
  isAdvertised,
  type LoopInput,
  loopAt,
  type PreparedLoop,
  prepareLoop,
  withCurveShape,
} from "./loop-input"
import { CLEAN_MEDIA_FRACTION, clogFactor, DUE_CLOGGING } from "./media"
import { CURVE_EXPONENT, type CurvePoint, M3_S_PER_L_H } from "./pump-curve"

export type TurnoverLevel = "good" | "acceptable" | "low"

export interface HeadShare {
  /** `media`, `hose`, `return_hose`, `lift`, or the kind of the element. */
  readonly element: string
  readonly head_m: number
}

export interface HoseFlow {
  readonly hose: "hose" | "return_hose"
  readonly velocity_m_s: number
  readonly reynolds: number
  readonly regime: Regime
}

export interface OperatingPoint {
  readonly flow_l_h: number
  /** Of the first hose. */
  readonly velocity_m_s: number
  readonly reynolds: number
  readonly head_m: number
  /** Where the pump's head goes; adds up to `head_m`. */
  readonly head_budget: readonly HeadShare[]
  readonly turnover_per_h?: number
  readonly turnover_level?: TurnoverLevel
  /** The same loop with clean media, and when the filter is due for cleaning. */
  readonly clean_flow_l_h: number
  readonly due_flow_l_h: number
  readonly hoses: readonly HoseFlow[]
  /** Head of the pump and head that the loop asks for, at the same flows. */
  readonly pump_curve: readonly CurvePoint[]
  readonly loop_curve: readonly CurvePoint[]
  /** What the loop asks for when the filter is due for cleaning. */
  readonly due_loop_curve: readonly CurvePoint[]
}

export interface FlowUncertainty {
  /** All of it together: the two contributions below, squared, added and rooted. */
  readonly flow_low_l_h: number
  readonly flow_high_l_h: number
  /** The shape of a curve known by two numbers only; absent with measured points. */
  readonly curve_low_l_h?: number
  readonly curve_high_l_h?: number
  /** The ranges of the fittings whose loss was taken from the table. */
  readonly fittings_low_l_h: number
  readonly fittings_high_l_h: number
}

/**
 * The flow that a filter pushes through its loop, L/h, and where its head goes.
 *
 * The pump's curve meets the loop's: friction (colebrook1939), fittings (table of elements), media, lift. The flow is
 * within 0.6 % of EPANET 2.3 for the same coefficients; the coefficients themselves carry the uncertainty returned.
 * Throws OutOfDomain when the pump cannot raise the water to the outflow, or the input contradicts itself.
 */
export function operatingPoint(input: LoopInput): Answer<OperatingPoint, FlowUncertainty> {
  const prepared = prepareLoop(input)
  const loop = loopAt(prepared, input.clogging)
  const flow = solveFlow(prepared.pump, loop)
  const hoses = hoseFlows(prepared, flow)
  const result: OperatingPoint = {
    flow_l_h: flow / M3_S_PER_L_H,
    velocity_m_s: hoses[0]!.velocity_m_s,
    reynolds: hoses[0]!.reynolds,
    head_m: loopHead(loop, flow),
    head_budget: headBudget(prepared, input.clogging, flow),
    ...turnover(flow / M3_S_PER_L_H, input.volume_l),
    clean_flow_l_h: flowAt(prepared, 0),
    due_flow_l_h: flowAt(prepared, DUE_CLOGGING),
    hoses,
    ...curves(prepared, loop),
  }
  return {
    result,
    uncertainty: flowUncertainty(prepared, flow / M3_S_PER_L_H),
    cautions: flowCautions(prepared, result),
    assumptions: flowAssumptions(input),
    method: method("Pump curve against loop curve", flowSourceIds(input)),
  }
}

/** The head that each part of the loop takes at a flow in m³/s; the sum is the loop's head. */
function headBudget(prepared: PreparedLoop, clogging: number, flow_m3_s: number): HeadShare[] {
  const factor = clogFactor(clogging)
  const { media, hoses, losses, input } = prepared
  const budget: HeadShare[] = [
    {
      element: "media",
      head_m: factor * flow_m3_s * (media.linear_s_m2 + flow_m3_s * media.quadratic_s2_m5),
    },
  ]
  hoses.forEach((hose, i) => {
    budget.push({ element: HOSE_NAMES[i]!, head_m: hoseHead(hose, flow_m3_s, prepared.viscosity_m2_s) })
  })
  losses.forEach((loss, i) => {
    const head_m = quadraticOf(loss.k, loss.bore_mm / 1000) * flow_m3_s ** 2
    budget.push({ element: input.elements[i]!.kind, head_m })
  })
  if (input.lift_m > 0) budget.push({ element: "lift", head_m: input.lift_m })
  return budget
}

/** Low and high flow from what the input leaves open, L/h: the pump's curve and the fittings. */
export function flowUncertainty(prepared: PreparedLoop, flow_l_h: number): FlowUncertainty {
  const { input } = prepared
  const fittings_low_l_h = flowAt(prepared, input.clogging, "high")
  const fittings_high_l_h = flowAt(prepared, input.clogging, "low")
  let low = (flow_l_h - fittings_low_l_h) ** 2
  let high = (fittings_high_l_h - flow_l_h) ** 2
  let curve = {}
  if (isAdvertised(input.pump)) {
    const curve_low_l_h = flowAt(withCurveShape(prepared, CURVE_EXPONENT.low), input.clogging)
    const curve_high_l_h = flowAt(withCurveShape(prepared, CURVE_EXPONENT.high), input.clogging)
    low += (flow_l_h - curve_low_l_h) ** 2
    high += (curve_high_l_h - flow_l_h) ** 2
    curve = { curve_low_l_h, curve_high_l_h }
  }
  return {
    flow_low_l_h: Math.max(0, flow_l_h - Math.sqrt(low)),
    flow_high_l_h: flow_l_h + Math.sqrt(high),
    ...curve,
    fittings_low_l_h,
    fittings_high_l_h,
  }
}

/** How often an hour the water passes the filter. Levels: good from 4, acceptable from 2.5; common practice. */
export function turnover(flow_l_h: number, volume_l: number | undefined) {
  if (volume_l === undefined) return {}
  const turnover_per_h = flow_l_h / volume_l
  const turnover_level: TurnoverLevel =
    turnover_per_h >= 4 ? "good" : turnover_per_h >= 2.5 ? "acceptable" : "low"
  return { turnover_per_h, turnover_level }
}

/** What the person should know about the flow itself. */
export function flowCautions(
  { input, pump }: PreparedLoop,
  result: Pick<OperatingPoint, "flow_l_h" | "turnover_per_h" | "turnover_level" | "hoses">,
): Caution[] {
  const cautions: Caution[] = []
  const add = (code: string, severity: Caution["severity"], message: string) =>
    cautions.push({ code, severity, message })
  const share = (result.flow_l_h * M3_S_PER_L_H) / pump.maxFlow_m3_s
  if (share < 0.75) {
    add(
      "real_flow_below_advertised",
      "info",
      `The real flow is ${figures(result.flow_l_h, 3)} L/h, ${figures(100 * share, 2)} % of the pump's greatest flow: hoses, fittings and media take the rest. Time a bucket to confirm it.`,
    )
  }
  for (const { hose, regime, reynolds } of result.hoses) {
    if (regime === "transitional") {
      add(
        "transitional_flow",
        "info",
        `The flow in the ${hose.replace("_", " ")} is neither laminar nor turbulent (Reynolds number ${figures(reynolds, 2)}): its friction wanders by about 20 %.`,
      )
    } else if (regime === "laminar") {
      add(
        "laminar_fittings",
        "warning",
        `At a Reynolds number of ${figures(reynolds, 2)} fittings lose more than the coefficients say; the real flow is lower.`,
      )
    }
  }
  if (result.turnover_level === "low") {
    add(
      "low_turnover",
      "warning",
      `The water passes the filter ${figures(result.turnover_per_h!, 2)} times an hour; below 2.5 a planted tank has still corners. Use a wider hose, a stronger filter or a circulation pump.`,
    )
  }
  if ((input.pump.speed_ratio ?? 1) < 0.4) {
    add("low_speed", "warning", "Below 40 % of their speed small pumps give less than the affinity laws say.")
  }
  if (input.elements.some(({ kind, k }) => kind === "lily_outflow" && k !== undefined && k < 0.7)) {
    add(
      "outflow_recovers_little",
      "warning",
      "A flared outflow recovers little of the speed: a loss coefficient below 0.7 is too good to be true.",
    )
  }
  return cautions
}

/** What the flow takes for granted. */
export function flowAssumptions(input: LoopInput): Assumption[] {
  const assumptions: Assumption[] = [
    {
      code: "clogging_scale",
      message: `Clogging runs from 0 (clean) over 0.3 (loaded, twice the loss) and 0.7 (due for cleaning, five times) to 1 (blocked, ten times); ${figures(input.clogging, 2)} makes the media cost ${figures(clogFactor(input.clogging), 3)} times their clean loss. The scale is a convention, not a measurement.`,
    },
    {
      code: "clean_media",
      message:
        input.clean_media_fraction === 1
          ? "The pump's numbers were measured with the media in."
          : `With clean media and no hose the filter passes ${figures(100 * input.clean_media_fraction, 2)} % of its advertised flow (${CLEAN_MEDIA_FRACTION.low * 100} to ${CLEAN_MEDIA_FRACTION.high * 100} % is usual); a measured bucket flow replaces this.`,
    },
  ]
  if (isAdvertised(input.pump)) {
    assumptions.push({
      code: "pump_curve_shape",
      message: `Between its two advertised numbers the pump's curve is taken to fall with the power ${CURVE_EXPONENT.typical} of the flow; the interval spans ${CURVE_EXPONENT.low} to ${CURVE_EXPONENT.high}. Points of the maker's curve replace this.`,
    })
  }
  const typical = input.elements.filter(({ k }) => k === undefined)
  if (typical.length > 0) {
    const labels = new Set(typical.map(({ kind }) => elementTable[kind].label.toLowerCase()))
    assumptions.push({
      code: "typical_losses",
      message: `Losses from the table of typical parts: ${[...labels].join(", ")}.`,
    })
  }
  return assumptions
}

/** The sources behind a loop: those of its physics and those of its elements, each once. */
export function flowSourceIds(input: LoopInput): SourceId[] {
  const ids: SourceId[] = ["hagenPoiseuille", "colebrook1939", "swameeJain1976", "kell1975", "patek2009"]
  ids.push(...(isAdvertised(input.pump) ? [] : (["ayer1955", "fritschCarlson1980"] as const)))
  if ((input.pump.speed_ratio ?? 1) !== 1) ids.push("pumpAffinity")
  ids.push(...input.elements.map(({ kind }) => elementTable[kind].source), "engineeringJudgement")
  return [...new Set(ids)]
}

const HOSE_NAMES = ["hose", "return_hose"] as const

/** Points of a curve on the wire, from no flow to the pump's greatest. */
const CURVE_POINTS = 21

export function hoseFlows({ hoses, viscosity_m2_s }: PreparedLoop, flow_m3_s: number): HoseFlow[] {
  return hoses.map((hose, i) => {
    const reynolds = reynoldsIn(hose, flow_m3_s, viscosity_m2_s)
    const velocity_m_s = flow_m3_s / boreArea(hose.bore_m)
    return { hose: HOSE_NAMES[i]!, velocity_m_s, reynolds, regime: regimeOf(reynolds) }
  })
}

function curves(prepared: PreparedLoop, loop: Loop) {
  const { pump } = prepared
  const due = loopAt(prepared, DUE_CLOGGING)
  const pump_curve: CurvePoint[] = []
  const loop_curve: CurvePoint[] = []
  const due_loop_curve: CurvePoint[] = []
  for (let i = 0; i < CURVE_POINTS; i++) {
    const flow = (pump.maxFlow_m3_s * i) / (CURVE_POINTS - 1)
    const flow_l_h = flow / M3_S_PER_L_H
    pump_curve.push({ flow_l_h, head_m: Math.max(0, pump.headAt(flow)) })
    loop_curve.push({ flow_l_h, head_m: loopHead(loop, flow) })
    due_loop_curve.push({ flow_l_h, head_m: loopHead(due, flow) })
  }
  return { pump_curve, loop_curve, due_loop_curve }
}
