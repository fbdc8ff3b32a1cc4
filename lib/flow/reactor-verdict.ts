import type { Answer, Assumption, Caution } from "@/lib/chemistry/answer"
import { method } from "@/lib/chemistry/answer"
import type { SourceId } from "@/lib/chemistry/sources"
import { bubbleRise } from "@/lib/gas/bubble-rise"
import { figures } from "@/lib/units/figures"
import { JETTING_FACTOR } from "./bubble-travel"
import { type CloggingLimit, cloggingLimit } from "./clogging-course"
import { DUE_CLOGGING } from "./media"
import {
  type FlowUncertainty,
  flowAssumptions,
  flowCautions,
  flowSourceIds,
  flowUncertainty,
  hoseFlows,
  turnover,
} from "./operating-point"
import { CURVE_EXPONENT, M3_S_PER_L_H } from "./pump-curve"
import { flowAtVelocity, outletCo2, saturation } from "./reactor"
import {
  JET_M_S,
  leastFlow,
  type ReactorState,
  type Reason,
  reactorState,
  type Verdict,
} from "./reactor-criteria"
import { type PreparedReactor, prepareReactor, type ReactorLoopInput, reactorDefaults } from "./reactor-input"

export interface ReactorAnswer {
  readonly flow_l_h: number
  readonly flow_without_reactor_l_h: number
  readonly turnover_per_h?: number
  readonly body_velocity_m_s: number
  readonly nozzle_velocity_m_s: number
  /** Rise of the largest bubble that the jet leaves whole: water faster than this holds none. */
  readonly bubble_rise_m_s: number
  /** Length of body that the bubbles need, the jetting factor included. */
  readonly required_length_m: number
  /** True if no bubble leaves the reactor. */
  readonly holds_bubbles: boolean
  readonly outlet_co2_mg_l: number
  readonly outlet_saturation_ratio: number
  /** Share of the gas that dissolves in the reactor. */
  readonly dissolution_fraction: number
  /** Flow of the loop below which the jet no longer breaks up the gas cap, from which it does for sure, and above
   * which bubbles reach the tank. */
  readonly minimum_flow_l_h: number
  readonly comfortable_flow_l_h: number
  readonly maximum_flow_l_h: number
  /** The clogging at which it gas-locks, as `cloggingCourse` finds it. */
  readonly limit: CloggingLimit
  readonly limit_clogging: number | null
  /** What a flat gas cap under the lid dissolves, fresh and after hours. */
  readonly fresh_cap_mg_min: number
  readonly aged_cap_mg_min: number
  readonly verdict: Verdict
  readonly reasons: readonly Reason[]
  /** The same reactor when the filter is due for cleaning. */
  readonly when_due: {
    readonly flow_l_h: number
    readonly verdict: Verdict
    readonly reasons: readonly Reason[]
  }
}

export interface ReactorUncertainty extends FlowUncertainty {
  /** The aged cap instead of the fresh one, where the gas gathers under the lid. */
  readonly dissolution_fraction_low: number
}

/**
 * Whether a reactor works in a loop, and why: its jet, its carry-over, its capacity, its cost in flow.
 *
 * @source cliftGraceWeber1978 and frossling1938 for the bubbles, bin1993 for the jet; the limits of flow and volume
 * are common practice. 5-40 °C. Throws OutOfDomain as `operatingPoint` does, and outside that range.
 */
export function reactorVerdict(input: ReactorLoopInput): Answer<ReactorAnswer, ReactorUncertainty> {
  const reactor = prepareReactor(input)
  const now = reactorState(reactor, input.clogging)
  const due = reactorState(reactor, DUE_CLOGGING)
  const result = reactorAnswer(reactor, now, due)
  const { loop } = reactor
  const flow = {
    ...turnover(now.flow_l_h, input.volume_l),
    flow_l_h: now.flow_l_h,
    hoses: hoseFlows(loop, now.flow_l_h * M3_S_PER_L_H),
  }
  return {
    result,
    uncertainty: {
      ...flowUncertainty(loop, now.flow_l_h),
      dissolution_fraction_low: dissolved(reactor, now, now.cap.aged_mg_min),
    },
    cautions: [...reactorCautions(input, result), ...flowCautions(loop, flow)],
    assumptions: [...flowAssumptions(loop.input), ...reactorAssumptions(reactor)],
    method: method("Four criteria of a through-flow reactor", [
      ...new Set([...flowSourceIds(loop.input), ...REACTOR_SOURCES]),
    ]),
  }
}

const REACTOR_SOURCES: readonly SourceId[] = [
  "bin1993",
  "schillerNaumann1935",
  "cliftGraceWeber1978",
  "frossling1938",
  "jahne1987",
  "plummerBusenberg1982",
]

function reactorAnswer(reactor: PreparedReactor, now: ReactorState, due: ReactorState): ReactorAnswer {
  const { into, feed_mg_min, nozzle_mm, body_mm, length_m, through } = reactor
  const required_length_m = JETTING_FACTOR * now.required_length_m
  const dissolution_fraction = dissolved(reactor, now, now.cap.fresh_mg_min)
  const outlet = outletCo2(into.co2_mg_l, feed_mg_min * dissolution_fraction, now.reactor_flow_l_h)
  return {
    flow_l_h: now.flow_l_h,
    flow_without_reactor_l_h: now.flow_without_l_h,
    ...(reactor.volume_l === undefined ? {} : { turnover_per_h: now.flow_l_h / reactor.volume_l }),
    body_velocity_m_s: now.body_velocity_m_s,
    nozzle_velocity_m_s: now.nozzle_velocity_m_s,
    bubble_rise_m_s: bubbleRise(reactor.feed_bubble_mm, into.water),
    required_length_m,
    holds_bubbles: required_length_m <= length_m,
    outlet_co2_mg_l: outlet,
    outlet_saturation_ratio: outlet / saturation(into),
    dissolution_fraction,
    minimum_flow_l_h: leastFlow(reactor),
    comfortable_flow_l_h: flowAtVelocity(JET_M_S.good, nozzle_mm) / through,
    maximum_flow_l_h:
      flowAtVelocity(reactor.bubbles.greatestVelocity(length_m / JETTING_FACTOR), body_mm) / through,
    ...cloggingLimit(reactor, reactor.loop),
    fresh_cap_mg_min: now.cap.fresh_mg_min,
    aged_cap_mg_min: now.cap.aged_mg_min,
    verdict: now.verdict,
    reasons: now.reasons,
    when_due: { flow_l_h: due.flow_l_h, verdict: due.verdict, reasons: due.reasons },
  }
}

/** Share of the feed that dissolves: all that is not carried out, at most what a cap takes where the gas gathers. */
function dissolved(reactor: PreparedReactor, state: ReactorState, cap_mg_min: number): number {
  const { bubbles, length_m, feed_mg_min } = reactor
  const taken = state.nozzle_velocity_m_s < JET_M_S.least ? Math.min(1, cap_mg_min / feed_mg_min) : 1
  if (JETTING_FACTOR * state.required_length_m <= length_m) return taken
  const escaped = bubbles.escapedFraction(state.body_velocity_m_s, length_m / JETTING_FACTOR)
  return taken * (1 - escaped)
}

function reactorCautions({ feed_mg_min }: ReactorLoopInput, result: ReactorAnswer): Caution[] {
  const cautions: Caution[] = [
    {
      code: "bleed_air",
      severity: "warning",
      message:
        "Air that is trapped in the reactor never dissolves, since the tank's water is full of air already: bleed it at the start and after every cleaning, and mount the reactor upright.",
    },
  ]
  const locks = result.reasons.find(
    ({ criterion, verdict }) => criterion === "gas_capacity" && verdict === "unsuitable",
  )
  if (locks) cautions.push({ code: "gas_lock", severity: "danger", message: locks.message })
  if (result.when_due.verdict !== result.verdict) {
    cautions.push({
      code: "worse_when_clogged",
      severity: "warning",
      message: `After months without cleaning the flow falls to ${figures(result.when_due.flow_l_h, 3)} L/h and the reactor becomes ${result.when_due.verdict}. Clean the filter before the flow is down to ${figures(result.minimum_flow_l_h, 3)} L/h, below which it grows noisy and gas-locks.`,
    })
  }
  if (!result.holds_bubbles) {
    cautions.push({
      code: "bubbles_reach_tank",
      severity: "warning",
      message: `Above ${figures(result.maximum_flow_l_h, 3)} L/h the water carries bubbles out of the reactor before they dissolve; they look like mist in the tank and waste part of the ${figures(feed_mg_min, 3)} mg/min.`,
    })
  }
  if (result.outlet_saturation_ratio > 0.5) {
    cautions.push({
      code: "near_saturation",
      severity: "danger",
      message: `The water leaves the reactor with ${figures(result.outlet_co2_mg_l, 3)} mg/L CO2, more than half of what it can hold: the flow is far too small for this feed.`,
    })
  }
  return cautions
}

function reactorAssumptions({ nozzle_mm, into, feed_bubble_mm }: PreparedReactor): Assumption[] {
  return [
    {
      code: "reactor_inlet",
      message: `The reactor's inlet is ${figures(nozzle_mm, 3)} mm wide (${reactorDefaults.nozzle_ratio} of the hose if you did not say); its jet leaves no bubble above ${figures(feed_bubble_mm, 2)} mm whole.`,
    },
    {
      code: "reactor_pressure",
      message: `The water in the reactor stands at ${figures(into.pressure_pa / 1e5, 3)} bar absolute and enters with ${figures(into.co2_mg_l, 3)} mg/L CO2.`,
    },
    {
      code: "jetting",
      message: `Bubbles need ${JETTING_FACTOR} times the length of calm flow, since the jet stirs the body; two numbers with another shape of pump curve (exponent ${CURVE_EXPONENT.low} to ${CURVE_EXPONENT.high}) move the flow by about 5 %.`,
    },
  ]
}
