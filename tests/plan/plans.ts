import { type PlanInput, planDefaults } from "@/lib/plan/plan-input"

/** A tank with a canister filter, everything else as the plan takes it by default. */
export function tankPlan(
  volume_l: number,
  filter: {
    readonly max_flow_l_h: number
    readonly max_head_m: number
    readonly inner_diameter_mm: number
  },
  more: Partial<PlanInput> = {},
): PlanInput {
  const { inner_diameter_mm, ...pump } = filter
  return { ...planDefaults, kh_dkh: 4, volume_l, pump, hose: { inner_diameter_mm, length_m: 3 }, ...more }
}

const usualFilter = { max_flow_l_h: 1000, max_head_m: 1.6, inner_diameter_mm: 16 }

/** The tanks of the design's worked loops. */
export const small = tankPlan(60, { max_flow_l_h: 400, max_head_m: 0.7, inner_diameter_mm: 12 })
export const middle = tankPlan(120, { max_flow_l_h: 700, max_head_m: 1.2, inner_diameter_mm: 12 })
export const usual = tankPlan(180, usualFilter)
export const large = tankPlan(450, { max_flow_l_h: 1850, max_head_m: 2.1, inner_diameter_mm: 19 })

/** Every string of a value, however deep. */
export function stringsIn(value: unknown): string[] {
  if (typeof value === "string") return [value]
  return value && typeof value === "object" ? Object.values(value).flatMap(stringsIn) : []
}

/** A part that closes the valve by itself: a plan has one of them. */
export function isControl({ part }: { readonly part: string }): boolean {
  return part === "timer" || part === "ph_controller"
}
