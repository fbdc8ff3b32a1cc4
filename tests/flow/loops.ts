import type { ElementInput } from "@/lib/flow/elements"
import { flowDefaults, type LoopInput } from "@/lib/flow/loop-input"

/** Fittings of the design's worked loops: strainer 2, 4 barbs 3.2, taps 3, bends 1.2, outflow 1.5. */
export const canisterElements: readonly ElementInput[] = [
  { kind: "intake_strainer" },
  { kind: "barb", count: 4 },
  { kind: "quick_release" },
  { kind: "bend", count: 4 },
  { kind: "lily_outflow" },
]

/** A worked loop of the design: 3 m of smooth hose, 25 °C, clean media. */
export function workedLoop(
  volume_l: number,
  inner_diameter_mm: number,
  max_flow_l_h: number,
  max_head_m: number,
): LoopInput {
  return {
    ...flowDefaults,
    pump: { max_flow_l_h, max_head_m },
    hose: { inner_diameter_mm, length_m: 3 },
    elements: canisterElements,
    volume_l,
  }
}

/** Every number of a value, however deep. */
export function numbersIn(value: unknown): number[] {
  if (typeof value === "number") return [value]
  return value && typeof value === "object" ? Object.values(value).flatMap(numbersIn) : []
}
