import { solveFlow } from "@/lib/flow/loop"
import { loopAt, type PreparedLoop } from "@/lib/flow/loop-input"
import { cleanMediaLoss, DUE_CLOGGING } from "@/lib/flow/media"
import { M3_S_PER_L_H, type PumpCurve } from "@/lib/flow/pump-curve"
import { findRoot } from "@/lib/numeric/find-root"
import { quantities } from "@/lib/units/quantities"

/** The flow that a method asks for: with clean media, and when the filter is due for cleaning. */
export interface FlowNeed {
  readonly clean_flow_l_h: number
  readonly due_flow_l_h: number
}

/** The least filter for a loop, as its maker advertises it, and the flow that it has to give. */
export interface MinimumFilter extends FlowNeed {
  /** `null` both when no canister filter gives the flow through this loop: the hose is too narrow. */
  readonly max_flow_l_h: number | null
  readonly max_head_m: number | null
  readonly present_is_enough: boolean
}

/**
 * The smallest filter that moves a flow through a loop: the present pump made bigger or smaller in flow and head
 * alike, as the sizes of one series are.
 */
export function minimumFilter(loop: PreparedLoop, need: FlowNeed): MinimumFilter {
  const clean = sizeFor(loop, need.clean_flow_l_h, 0)
  const due = sizeFor(loop, need.due_flow_l_h, DUE_CLOGGING)
  if (clean === null || due === null) {
    return { ...need, max_flow_l_h: null, max_head_m: null, present_is_enough: false }
  }
  const size = Math.max(clean, due)
  return {
    ...need,
    max_flow_l_h: (size * loop.pump.maxFlow_m3_s) / M3_S_PER_L_H,
    max_head_m: size * loop.pump.shutOff_m,
    present_is_enough: size <= 1,
  }
}

/** How many times the present pump gives a flow at a state of the media; `null` if no canister filter is as big. */
function sizeFor(loop: PreparedLoop, flow_l_h: number, clogging: number): number | null {
  const short = (size: number) => {
    const pump = sized(loop.pump, size)
    const media = cleanMediaLoss(pump, loop.input.clean_media_fraction)
    return solveFlow(pump, loopAt({ ...loop, pump, media }, clogging)) / M3_S_PER_L_H - flow_l_h
  }
  const biggestSold = Math.min(
    quantities.max_head_m.max / loop.pump.shutOff_m,
    quantities.max_flow_l_h.max / (loop.pump.maxFlow_m3_s / M3_S_PER_L_H),
  )
  const biggest = Math.max(1, biggestSold)
  if (short(biggest) < 0) return null
  if (short(SMALLEST) >= 0) return SMALLEST
  return findRoot({ f: short, low: SMALLEST, high: biggest, tolerance: 1e-3 })
}

const SMALLEST = 1e-3

function sized({ shutOff_m, maxFlow_m3_s, headAt }: PumpCurve, size: number): PumpCurve {
  return {
    shutOff_m: size * shutOff_m,
    maxFlow_m3_s: size * maxFlow_m3_s,
    headAt: (flow) => size * headAt(flow / size),
  }
}
