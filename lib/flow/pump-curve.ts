import { interpolateCubic, monotoneSlopes, type Table } from "@/lib/numeric/interpolate"
import { OutOfDomain } from "@/lib/units/out-of-domain"

/** Head of a pump over its flow: falls from `shutOff_m` at no flow to 0 at `maxFlow_m3_s`. */
export interface PumpCurve {
  readonly shutOff_m: number
  readonly maxFlow_m3_s: number
  /** Head in m at a flow in m³/s from 0 to `maxFlow_m3_s`. */
  readonly headAt: (flow_m3_s: number) => number
}

/** One point of a measured or printed curve, as on the wire. */
export interface CurvePoint {
  readonly flow_l_h: number
  readonly head_m: number
}

/** 1 L/h in m³/s; exact. */
export const M3_S_PER_L_H = 1 / 3.6e6

/** The shape between "straight line" and "parabola" that two advertised numbers leave open, and our middle. */
export const CURVE_EXPONENT = { low: 1, typical: 1.5, high: 2 }

/**
 * The curve through a pump's two advertised numbers: H = Hmax (1 − (Q/Qmax)^n).
 *
 * @source engineeringJudgement for n = 1.5; n = 1 to 2 spans the curves of small centrifugal pumps, and n = 2 is
 * EPANET's curve from one point.
 */
export function advertisedCurve(
  { max_flow_l_h, max_head_m }: { readonly max_flow_l_h: number; readonly max_head_m: number },
  exponent: number,
): PumpCurve {
  const maxFlow_m3_s = max_flow_l_h * M3_S_PER_L_H
  return {
    shutOff_m: max_head_m,
    maxFlow_m3_s,
    headAt: (flow) => max_head_m * (1 - (flow / maxFlow_m3_s) ** exponent),
  }
}

/**
 * The curve through measured points: sorted by flow, made to fall (rising neighbours pooled), then joined by a
 * monotone cubic. Three points that do not fall get the parabola that fits them best instead. Below the first
 * point the head stays, beyond the last it goes on falling in a line to 0.
 *
 * @source ayer1955 for the pooling, fritschCarlson1980 for the cubic.
 * Throws {@link OutOfDomain} with fewer than two flows, or when the head never falls.
 */
export function tabulatedCurve(points: readonly CurvePoint[]): PumpCurve {
  const table = mergeEqualFlows(points)
  if (table.x.length < 2) {
    throw new OutOfDomain(
      "pump.points",
      "A curve needs at least two points at different flows. Measure one more.",
    )
  }
  if (table.x.length === 3 && !falls(table.y)) return fittedParabola(table)
  return monotoneCurve({ x: table.x, y: pooled(table.y) })
}

/**
 * The same pump at another speed: flow in proportion to the speed ratio, head to its square.
 *
 * @source pumpAffinity. Below a ratio of about 0.4 small magnetic-drive pumps give less.
 */
export function atSpeed(curve: PumpCurve, ratio: number): PumpCurve {
  if (ratio === 1) return curve
  return {
    shutOff_m: curve.shutOff_m * ratio ** 2,
    maxFlow_m3_s: curve.maxFlow_m3_s * ratio,
    headAt: (flow) => ratio ** 2 * curve.headAt(flow / ratio),
  }
}

function mergeEqualFlows(points: readonly CurvePoint[]): Table {
  const sorted = [...points].sort((a, b) => a.flow_l_h - b.flow_l_h)
  const x: number[] = []
  const y: number[] = []
  let sharing = 0
  for (const { flow_l_h, head_m } of sorted) {
    const flow = flow_l_h * M3_S_PER_L_H
    const last = x.length - 1
    sharing = x[last] === flow ? sharing + 1 : 1
    if (sharing === 1) {
      x.push(flow)
      y.push(head_m)
    } else y[last] = y[last]! + (head_m - y[last]!) / sharing
  }
  return { x, y }
}

function falls(heads: readonly number[]): boolean {
  return heads.every((head, i) => i === 0 || head < heads[i - 1]!)
}

/** The non-increasing sequence nearest to the heads in the least-squares sense. @source ayer1955 */
function pooled(heads: readonly number[]): number[] {
  const blocks: { mean: number; size: number }[] = []
  for (const head of heads) {
    let block = { mean: head, size: 1 }
    for (let before = blocks.at(-1); before && before.mean < block.mean; before = blocks.at(-1)) {
      const size = before.size + block.size
      block = { mean: (before.mean * before.size + block.mean * block.size) / size, size }
      blocks.pop()
    }
    blocks.push(block)
  }
  return blocks.flatMap(({ mean, size }) => Array<number>(size).fill(mean))
}

function monotoneCurve(table: Table): PumpCurve {
  const { x, y } = table
  const slopes = monotoneSlopes(table)
  const firstFlow = x[0]!
  const lastFlow = x.at(-1)!
  const lastHead = y.at(-1)!
  const tail = lastSlope(table)
  return {
    shutOff_m: y[0]!,
    maxFlow_m3_s: lastFlow - lastHead / tail,
    headAt: (flow) => {
      if (flow <= firstFlow) return y[0]!
      if (flow >= lastFlow) return lastHead + tail * (flow - lastFlow)
      return interpolateCubic(table, slopes, flow)
    },
  }
}

/** Slope of the last stretch on which the head falls, m per m³/s. */
function lastSlope({ x, y }: Table): number {
  for (let i = x.length - 1; i > 0; i--) {
    if (y[i]! < y[i - 1]!) return (y[i]! - y[i - 1]!) / (x[i]! - x[i - 1]!)
  }
  throw neverFalls()
}

/**
 * The falling parabola H = a − bQ − cQ² (b, c ≥ 0) nearest to points that do not fall. It cannot pass through
 * them, so the best one has b = 0 or c = 0: a straight line in Q or in Q².
 */
function fittedParabola(table: Table): PumpCurve {
  const [best] = [fitInPower(table, 1), fitInPower(table, 2)]
    .filter((fit) => fit.slope < 0)
    .sort((one, other) => one.error - other.error)
  if (!best) throw neverFalls()
  const { power, intercept, slope } = best
  return {
    shutOff_m: intercept,
    maxFlow_m3_s: (-intercept / slope) ** (1 / power),
    headAt: (flow) => intercept + slope * flow ** power,
  }
}

/** Straight line of the heads over Q^power by least squares, and the sum of its squared errors. */
function fitInPower({ x, y }: Table, power: number) {
  const u = x.map((flow) => flow ** power)
  const meanU = mean(u)
  const meanY = mean(y)
  const spread = u.reduce((sum, value) => sum + (value - meanU) ** 2, 0)
  const slope = u.reduce((sum, value, i) => sum + (value - meanU) * (y[i]! - meanY), 0) / spread
  const intercept = meanY - slope * meanU
  const error = u.reduce((sum, value, i) => sum + (intercept + slope * value - y[i]!) ** 2, 0)
  return { power, intercept, slope, error }
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length
}

function neverFalls(): OutOfDomain {
  return new OutOfDomain(
    "pump.points",
    "The head does not fall as the flow grows, so this is no pump curve. Check that flow and head were not swapped.",
  )
}
