import { GRAVITY_M_S2 } from "@/lib/gas/bubble-rise"
import { findRoot } from "@/lib/numeric/find-root"
import { frictionFactor, LAMINAR_BELOW } from "./friction"
import type { PumpCurve } from "./pump-curve"

/** A length of hose of one bore. `corrugation` multiplies its friction: 1 smooth, about 2.5 corrugated. */
export interface HoseRun {
  readonly bore_m: number
  readonly length_m: number
  readonly roughness_m: number
  readonly corrugation: number
}

/** Everything that costs head between the pump's outlet and its inlet: linear and quadratic terms, hoses, lift. */
export interface Loop {
  readonly hoses: readonly HoseRun[]
  readonly linear_s_m2: number
  readonly quadratic_s2_m5: number
  readonly lift_m: number
  readonly viscosity_m2_s: number
}

export function boreArea(bore_m: number): number {
  return (Math.PI / 4) * bore_m * bore_m
}

/** K v²/2g of a fitting written as coefficient of Q², s²/m⁵. */
export function quadraticOf(k: number, bore_m: number): number {
  return k / (2 * GRAVITY_M_S2 * boreArea(bore_m) ** 2)
}

export function reynoldsIn(hose: HoseRun, flow_m3_s: number, viscosity_m2_s: number): number {
  return (flow_m3_s * hose.bore_m) / (boreArea(hose.bore_m) * viscosity_m2_s)
}

/**
 * Friction head of a hose, m, at a flow of 0 or more in m³/s.
 *
 * @source hagenPoiseuille and colebrook1939 through frictionFactor, in Darcy's and Weisbach's form.
 */
export function hoseHead(hose: HoseRun, flow_m3_s: number, viscosity_m2_s: number): number {
  const velocity = flow_m3_s / boreArea(hose.bore_m)
  const reynolds = (velocity * hose.bore_m) / viscosity_m2_s
  const perLength =
    reynolds <= LAMINAR_BELOW
      ? (32 * viscosity_m2_s * velocity) / (GRAVITY_M_S2 * hose.bore_m ** 2)
      : (frictionFactor(reynolds, hose.roughness_m / hose.bore_m) * velocity * velocity) /
        (2 * GRAVITY_M_S2 * hose.bore_m)
  return hose.corrugation * perLength * hose.length_m
}

/** Head that the loop asks for at a flow, m; grows strictly with the flow. */
export function loopHead(loop: Loop, flow_m3_s: number): number {
  let head = loop.lift_m + flow_m3_s * (loop.linear_s_m2 + flow_m3_s * loop.quadratic_s2_m5)
  for (const hose of loop.hoses) head += hoseHead(hose, flow_m3_s, loop.viscosity_m2_s)
  return head
}

/**
 * The flow in m³/s at which the pump's head is what the loop asks for; 0 when the pump cannot lift the water.
 *
 * The excess head falls strictly with the flow, so there is one answer. Solved to the last digits, so that the heads
 * of the elements add up to the pump's.
 */
export function solveFlow(pump: PumpCurve, loop: Loop): number {
  if (pump.shutOff_m <= loop.lift_m) return 0
  return findRoot({
    f: (flow) => pump.headAt(flow) - loopHead(loop, flow),
    low: 0,
    high: pump.maxFlow_m3_s,
    tolerance: 1e-15 * pump.maxFlow_m3_s,
  })
}
