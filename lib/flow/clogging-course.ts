import type { Answer, Caution } from "@/lib/chemistry/answer"
import { method } from "@/lib/chemistry/answer"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { loopHead } from "./loop"
import { isAdvertised, loopAt, type PreparedLoop, withCurveShape } from "./loop-input"
import { cloggingOf } from "./media"
import { flowAssumptions, flowSourceIds } from "./operating-point"
import { CURVE_EXPONENT, M3_S_PER_L_H } from "./pump-curve"
import { gasCap } from "./reactor"
import { leastFlow, reactorState, type Verdict } from "./reactor-criteria"
import { type PreparedReactor, prepareReactor, type ReactorLoopInput } from "./reactor-input"

export interface CloggingInput extends ReactorLoopInput {
  /** How many states of the media to look at, from clean to blocked. */
  readonly steps: number
}

/** States of the media that a course shows if the caller does not say. */
export const DEFAULT_STEPS = 11
export const MOST_STEPS = 101

export interface CloggingStep {
  readonly clogging: number
  readonly flow_l_h: number
  readonly nozzle_velocity_m_s: number
  readonly verdict: Verdict
}

/**
 * Why there is a limit or none: `reached` inside the scale, `already` with clean media, `never` when the gas cap
 * alone dissolves the feed, `beyond` when even blocked media leave enough flow.
 */
export type CloggingLimit = "reached" | "already" | "never" | "beyond"

export interface CloggingCourse {
  readonly series: readonly CloggingStep[]
  /** The clogging at which the reactor gas-locks; `null` when it does not on this scale. */
  readonly limit_clogging: number | null
  /** The flow at which the inlet jet no longer breaks up the gas cap. */
  readonly limit_flow_l_h: number
  readonly limit: CloggingLimit
}

export interface CloggingUncertainty {
  /** The limit over the shapes that the pump's curve may have; the same twice with measured points, `null` off the scale. */
  readonly limit_clogging_low: number | null
  readonly limit_clogging_high: number | null
}

/**
 * What clogging does to a reactor: flow and verdict from clean to blocked media, and the clogging at which it
 * gas-locks. The limit is where the inlet jet falls to 0.8 m/s (bin1993) while the feed is more than an aged gas cap
 * dissolves; it follows from the head that is left for the media at that flow, without a search. Throws
 * {@link OutOfDomain} as `reactorVerdict` does, and on a number of steps that makes no course.
 */
export function cloggingCourse(input: CloggingInput): Answer<CloggingCourse, CloggingUncertainty> {
  if (!(input.steps >= 2 && input.steps <= MOST_STEPS && Number.isInteger(input.steps))) {
    throw new OutOfDomain("steps", `Give a whole number of steps from 2 to ${MOST_STEPS}.`)
  }
  const reactor = prepareReactor(input)
  const series = Array.from({ length: input.steps }, (_, i) => {
    const clogging = i / (input.steps - 1)
    const { flow_l_h, nozzle_velocity_m_s, verdict } = reactorState(reactor, clogging)
    return { clogging, flow_l_h, nozzle_velocity_m_s, verdict }
  })
  const { limit, limit_clogging } = cloggingLimit(reactor, reactor.loop)
  const result = { series, limit_clogging, limit_flow_l_h: leastFlow(reactor), limit }
  return {
    result,
    uncertainty: limitRange(reactor),
    cautions: cloggingCautions(result, input),
    assumptions: flowAssumptions(reactor.loop.input),
    method: method("Flow against clogging of the media", [
      ...new Set([...flowSourceIds(reactor.loop.input), "bin1993" as const]),
    ]),
  }
}

/** The limit of a loop, and the clogging where it lies: 0 if it is passed with clean media, `null` off the scale. */
export function cloggingLimit(
  reactor: PreparedReactor,
  loop: PreparedLoop,
): { readonly limit: CloggingLimit; readonly limit_clogging: number | null } {
  if (reactor.feed_mg_min <= gasCap(reactor.body_mm, reactor.into).aged_mg_min) {
    return { limit: "never", limit_clogging: null }
  }
  const clogging = cloggingAtFlow(loop, leastFlow(reactor) * M3_S_PER_L_H)
  if (!(clogging > 0)) return { limit: "already", limit_clogging: 0 }
  return clogging > 1
    ? { limit: "beyond", limit_clogging: null }
    : { limit: "reached", limit_clogging: clogging }
}

/**
 * The clogging at which a loop passes a flow: the head that the pump has left for the media over what clean media
 * take. Not a number when the rest of the loop takes more than the pump has, infinite when clean media take nothing.
 */
function cloggingAtFlow(loop: PreparedLoop, flow_m3_s: number): number {
  const { linear_s_m2, quadratic_s2_m5 } = loop.media
  const clean_m = flow_m3_s * (linear_s_m2 + flow_m3_s * quadratic_s2_m5)
  const rest_m = loopHead(loopAt(loop, 0), flow_m3_s) - clean_m
  return cloggingOf((loop.pump.headAt(flow_m3_s) - rest_m) / clean_m)
}

function limitRange(reactor: PreparedReactor): CloggingUncertainty {
  const { loop } = reactor
  const shapes = isAdvertised(loop.input.pump)
    ? [withCurveShape(loop, CURVE_EXPONENT.low), withCurveShape(loop, CURVE_EXPONENT.high)]
    : [loop]
  const limits = shapes.map(
    (shape) => cloggingLimit(reactor, shape).limit_clogging ?? Number.POSITIVE_INFINITY,
  )
  const onScale = (clogging: number) => (clogging <= 1 ? clogging : null)
  return {
    limit_clogging_low: onScale(Math.min(...limits)),
    limit_clogging_high: onScale(Math.max(...limits)),
  }
}

function cloggingCautions(result: CloggingCourse, input: CloggingInput): Caution[] {
  const cautions: Caution[] = []
  const flow = `${figures(result.limit_flow_l_h, 3)} L/h`
  if (result.limit === "already") {
    cautions.push({
      code: "gas_lock",
      severity: "danger",
      message: `Even with clean media the flow is below ${flow}: the jet does not break up the gas and the reactor gas-locks.`,
    })
  }
  if (result.limit === "reached") {
    cautions.push({
      code: "clean_before_limit",
      severity: "warning",
      message: `Clean the filter before its flow has fallen to ${flow}; below it the reactor grows noisy and gas-locks.`,
    })
  }
  if (input.clean_media_fraction === 1) {
    cautions.push({
      code: "clogging_not_modelled",
      severity: "warning",
      message:
        "The pump's numbers include its media, so their loss is not known apart and clogging changes nothing here. Measure the flow with a bucket when clean, and clean the filter when it has fallen by a quarter.",
    })
  }
  return cautions
}
