import { type CurvePoint, M3_S_PER_L_H, type PumpCurve, tabulatedCurve } from "@/lib/flow/pump-curve"
import { OutOfDomain } from "@/lib/units/out-of-domain"

/** What a curve's points leave to say: what is wrong, or what the fit had to put right. */
export interface PointsCheck {
  readonly problem?: string
  readonly note?: string
  readonly curve?: PumpCurve
}

/** Checks points as their maker printed them: the more flow, the less head. */
export function checkPoints(points: readonly CurvePoint[]): PointsCheck {
  if (points.some(({ flow_l_h, head_m }) => !Number.isFinite(flow_l_h) || !Number.isFinite(head_m))) {
    return { problem: "Every point needs a flow and a head: fill in the empty cell, or remove the point." }
  }
  if (points.some(({ flow_l_h, head_m }) => flow_l_h < 0 || flow_l_h > 20_000 || head_m < 0 || head_m > 10)) {
    return { problem: "A point lies outside 0 to 20,000 L/h and 0 to 10 m." }
  }
  try {
    const curve = tabulatedCurve(points)
    const rising = points
      .map((point, index) => ({ ...point, number: index + 1 }))
      .sort((a, b) => a.flow_l_h - b.flow_l_h)
      .find((point, index, sorted) => index > 0 && point.head_m > sorted[index - 1]!.head_m)
    if (!rising) return { curve, note: "The head falls from point to point, as a pump's does." }
    return {
      curve,
      note: `The head rises at point ${rising.number}, which no pump does. Check that point; until then the fitted curve levels it out.`,
    }
  } catch (error) {
    if (error instanceof OutOfDomain) return { problem: error.detail }
    throw error
  }
}

/** Points along a fitted curve, for drawing. */
export function drawnCurve(curve: PumpCurve, most_l_h: number): CurvePoint[] {
  const end_l_h = Math.min(curve.maxFlow_m3_s / M3_S_PER_L_H, most_l_h)
  return Array.from({ length: 61 }, (_, step) => {
    const flow_l_h = (end_l_h * step) / 60
    return { flow_l_h, head_m: Math.max(0, curve.headAt(flow_l_h * M3_S_PER_L_H)) }
  })
}

/** Points to start from where a box prints two numbers only: the usual curve between them. */
export function pointsFromTwo(max_flow_l_h: number, max_head_m: number): CurvePoint[] {
  return [0, 0.25, 0.5, 0.75, 1].map((share) => ({
    flow_l_h: Math.round(max_flow_l_h * share),
    head_m: Number((max_head_m * (1 - share ** 1.5)).toFixed(2)),
  }))
}
