/** What a plan gives and costs. Prices in US cents; null is unlimited. */
export interface Plan {
  readonly name: string
  readonly price_minor: number
  readonly included_units: number
  /** Cents for each 1,000 units beyond the included ones; null: the plan stops there. */
  readonly overage_minor_per_1000: number | null
  readonly calls_per_s: number
  readonly widgets: number | null
  readonly team: number | null
  /** Whether widgets carry our credit line. */
  readonly credit_line: boolean
}

/** The plans: the one place that prices, quotas and limits come from. */
export const plans = {
  nano: {
    name: "Nano",
    price_minor: 0,
    included_units: 1_000,
    overage_minor_per_1000: null,
    calls_per_s: 5,
    widgets: 1,
    team: 2,
    credit_line: true,
  },
  storefront: {
    name: "Storefront",
    price_minor: 2_900,
    included_units: 50_000,
    overage_minor_per_1000: 80,
    calls_per_s: 25,
    widgets: 10,
    team: 8,
    credit_line: false,
  },
  brand: {
    name: "Brand",
    price_minor: 18_900,
    included_units: 500_000,
    overage_minor_per_1000: 40,
    calls_per_s: 100,
    widgets: null,
    team: null,
    credit_line: false,
  },
} as const satisfies Record<string, Plan>

export type PlanId = keyof typeof plans

/** The plan by its id as the database keeps it. An unknown id is a fault of ours. */
export function planOf(id: string): Plan {
  const plan: Plan | undefined = plans[id as PlanId]
  if (!plan) throw new Error(`There is no plan "${id}"`)
  return plan
}

/** Units that an account may spend in a period: what is included, and what its owner's ceiling buys beyond. */
export function unitCapOf(plan: Plan, overageCap_minor: number): number {
  if (plan.overage_minor_per_1000 === null) return plan.included_units
  return plan.included_units + Math.floor((overageCap_minor * 1000) / plan.overage_minor_per_1000)
}
