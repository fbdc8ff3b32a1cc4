import { figures } from "@/lib/units/figures"
import { JETTING_FACTOR } from "./bubble-travel"
import { flowAt } from "./loop-input"
import { boreVelocity, contactVolume, flowAtVelocity, type GasCap, gasCap } from "./reactor"
import type { PreparedReactor } from "./reactor-input"

export const verdicts = ["suitable", "marginal", "unsuitable"] as const
export type Verdict = (typeof verdicts)[number]

/** One finding about a reactor: what was found, and what that means. */
export interface Reason {
  readonly criterion: Criterion
  readonly verdict: Verdict
  readonly value: number
  readonly message: string
}

export type Criterion =
  | "jet_velocity"
  | "carry_over"
  | "gas_capacity"
  | "flow_loss"
  | "turnover"
  | "real_flow"
  | "water_volume"

/** Inlet speed that breaks up the gas cap for sure, and the least that may, m/s. @source bin1993 */
export const JET_M_S = { good: 1, least: 0.8 }

/** L/h and L below which a reactor is no good, and from which it runs with room to spare. Common practice, no source. */
const REAL_FLOW_L_H = { good: 450, least: 250 }
const WATER_VOLUME_L = { good: 150, least: 80 }

/** What a reactor does at one state of the filter's media. */
export interface ReactorState {
  readonly flow_l_h: number
  readonly flow_without_l_h: number
  /** Of the part that passes through the reactor. */
  readonly reactor_flow_l_h: number
  readonly body_velocity_m_s: number
  readonly nozzle_velocity_m_s: number
  /** Calm length that the largest swept bubble needs to dissolve. */
  readonly required_length_m: number
  readonly cap: GasCap
  readonly verdict: Verdict
  readonly reasons: readonly Reason[]
}

/** Evaluates the criteria of the physics and the rules of the trade at a state of the filter's media. */
export function reactorState(reactor: PreparedReactor, clogging: number): ReactorState {
  const flow_l_h = flowAt(reactor.loop, clogging)
  const reactor_flow_l_h = flow_l_h * reactor.through
  const body_velocity_m_s = boreVelocity(reactor_flow_l_h, reactor.body_mm)
  const state = {
    flow_l_h,
    flow_without_l_h: flowAt(reactor.loopWithout, clogging),
    reactor_flow_l_h,
    body_velocity_m_s,
    nozzle_velocity_m_s: boreVelocity(reactor_flow_l_h, reactor.nozzle_mm),
    required_length_m: reactor.bubbles.carryOver(body_velocity_m_s).length_m,
    cap: gasCap(reactor.body_mm, reactor.into),
  }
  const reasons = reasonsOf(reactor, state)
  return { ...state, reasons, verdict: worst(reasons.map(({ verdict }) => verdict)) }
}

/** The flow through the loop below which the jet no longer breaks up the gas cap, L/h. */
export function leastFlow({ nozzle_mm, through }: PreparedReactor): number {
  return flowAtVelocity(JET_M_S.least, nozzle_mm) / through
}

export function worst(found: readonly Verdict[]): Verdict {
  return verdicts[Math.max(0, ...found.map((verdict) => verdicts.indexOf(verdict)))]!
}

type Measured = Omit<ReactorState, "reasons" | "verdict">

function reasonsOf(reactor: PreparedReactor, state: Measured): Reason[] {
  const reasons = [
    jetVelocity(reactor, state),
    carryOverReason(reactor, state),
    gasCapacity(reactor, state),
    flowLoss(state),
    realFlow(state),
  ]
  if (reactor.volume_l !== undefined) {
    reasons.push(turnoverReason(state, reactor.volume_l), waterVolume(reactor.volume_l))
  }
  return reasons
}

function jetVelocity({ feed_mg_min }: PreparedReactor, state: Measured): Reason {
  const value = state.nozzle_velocity_m_s
  const speed = `${figures(value, 2)} m/s`
  if (value >= JET_M_S.good) {
    return reason(
      "jet_velocity",
      "suitable",
      value,
      `The inlet jet of ${speed} breaks up the gas under the lid.`,
    )
  }
  if (value >= JET_M_S.least) {
    return reason(
      "jet_velocity",
      "marginal",
      value,
      `The inlet jet of ${speed} breaks up the gas only just; from ${JET_M_S.good} m/s it does so for sure. Expect noise when the filter clogs.`,
    )
  }
  const quiet = feed_mg_min <= state.cap.aged_mg_min
  return reason(
    "jet_velocity",
    quiet ? "marginal" : "unsuitable",
    value,
    quiet
      ? `The inlet jet of ${speed} leaves the gas as a cap under the lid, but the cap's surface alone dissolves this little gas.`
      : `The inlet jet of ${speed} is below ${JET_M_S.least} m/s, so the gas gathers as a cap under the lid.`,
  )
}

function carryOverReason({ length_m }: PreparedReactor, state: Measured): Reason {
  const ratio = (JETTING_FACTOR * state.required_length_m) / length_m
  const facts = `At ${figures(state.body_velocity_m_s, 2)} m/s in the body a bubble needs ${figures(100 * JETTING_FACTOR * state.required_length_m, 2)} cm to dissolve, and it has ${figures(100 * length_m, 3)} cm`
  if (ratio <= 1) return reason("carry_over", "suitable", ratio, `${facts}: none gets out.`)
  if (ratio <= 1.7) return reason("carry_over", "marginal", ratio, `${facts}: fine bubbles reach the tank.`)
  return reason(
    "carry_over",
    "unsuitable",
    ratio,
    `${facts}: gas is flushed into the tank. Take a wider body, or lead part of the flow around it.`,
  )
}

function gasCapacity(reactor: PreparedReactor, state: Measured): Reason {
  const { feed_mg_min, body_mm, length_m } = reactor
  const feed = `${figures(feed_mg_min, 3)} mg/min`
  if (state.nozzle_velocity_m_s < JET_M_S.least) return capCapacity(feed_mg_min, feed, state.cap)
  const needed_l = contactVolume(feed_mg_min)
  const body_l = (Math.PI / 4) * (body_mm / 100) ** 2 * (length_m * 10)
  const ratio = needed_l / body_l
  const facts = `${feed} of gas asks for ${figures(needed_l, 2)} L of bubbly water, and the body holds ${figures(body_l, 2)} L`
  if (ratio <= 1) return reason("gas_capacity", "suitable", ratio, `${facts}.`)
  return reason(
    "gas_capacity",
    ratio <= 2 ? "marginal" : "unsuitable",
    ratio,
    `${facts}: undissolved gas gathers. Take a bigger body or feed less.`,
  )
}

function capCapacity(feed_mg_min: number, feed: string, { fresh_mg_min, aged_mg_min }: GasCap): Reason {
  const ratio = feed_mg_min / Math.max(fresh_mg_min, Number.MIN_VALUE)
  if (feed_mg_min <= aged_mg_min) {
    return reason("gas_capacity", "suitable", ratio, `The gas cap dissolves ${feed} quietly, even when aged.`)
  }
  if (feed_mg_min <= fresh_mg_min) {
    return reason(
      "gas_capacity",
      "unsuitable",
      ratio,
      `A fresh gas cap dissolves ${figures(fresh_mg_min, 2)} mg/min, an aged one ${figures(aged_mg_min, 2)}: with ${feed} the reactor is likely to gas-lock within hours and has to be bled.`,
    )
  }
  return reason(
    "gas_capacity",
    "unsuitable",
    ratio,
    `Even a fresh gas cap dissolves only ${figures(fresh_mg_min, 2)} mg/min of the ${feed}: the reactor gas-locks.`,
  )
}

function flowLoss({ flow_l_h, flow_without_l_h }: Measured): Reason {
  const loss = 1 - flow_l_h / flow_without_l_h
  const message = `The reactor takes ${figures(100 * loss, 2)} % of the flow.`
  return reason("flow_loss", banded(-loss, { good: -0.1, least: -0.2 }), loss, message)
}

/**
 * Low turnover never makes a reactor unsuitable by itself: the gas dissolves, and a wider hose or a circulation pump
 * spreads it.
 */
function turnoverReason({ flow_l_h }: Measured, volume_l: number): Reason {
  const value = flow_l_h / volume_l
  const facts = `The water passes the reactor ${figures(value, 2)} times an hour`
  if (value >= 3) return reason("turnover", "suitable", value, `${facts}.`)
  const mend = value >= 2 ? "a second filter or a circulation pump" : "a wider hose and a circulation pump"
  return reason("turnover", "marginal", value, `${facts}; from 3 on CO2 spreads evenly. Add ${mend}.`)
}

function realFlow({ flow_l_h }: Measured): Reason {
  const verdict = banded(flow_l_h, REAL_FLOW_L_H)
  const { good, least } = REAL_FLOW_L_H
  const message = `The real flow is ${figures(flow_l_h, 3)} L/h; a reactor wants at least ${least}, better ${good}.`
  return reason("real_flow", verdict, flow_l_h, message)
}

function waterVolume(volume_l: number): Reason {
  const { good, least } = WATER_VOLUME_L
  const message = `The tank holds ${figures(volume_l, 3)} L; a reactor suits tanks from ${least} L, better from ${good}.`
  return reason("water_volume", banded(volume_l, WATER_VOLUME_L), volume_l, message)
}

function banded(value: number, { good, least }: { readonly good: number; readonly least: number }): Verdict {
  if (value >= good) return "suitable"
  return value >= least ? "marginal" : "unsuitable"
}

function reason(criterion: Criterion, verdict: Verdict, value: number, message: string): Reason {
  return { criterion, verdict, value, message }
}
