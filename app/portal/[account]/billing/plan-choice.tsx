"use client"

import { Button } from "@/app/ui/button"
import { usd } from "@/app/ui/money"
import { plans } from "@/lib/billing/plans"

/** The paid plans, each with the way to its checkout. */
export function PlanChoice({
  busy,
  onChoose,
}: {
  busy: boolean
  onChoose: (plan: "storefront" | "brand") => void
}) {
  return (
    <ul className="grid gap-px border-y border-line bg-line sm:grid-cols-2">
      {(["storefront", "brand"] as const).map((id) => {
        const plan = plans[id]
        return (
          <li key={id} className="bg-paper py-6 sm:first:pr-8 sm:last:pl-8">
            <h3 className="text-lg">{plan.name}</h3>
            <p className="mt-1 font-mono text-2xl font-medium">
              {usd(plan.price_minor)} <span className="text-sm font-normal text-soft">a month</span>
            </p>
            <ul className="mt-4 space-y-1 text-sm text-soft">
              <li>{plan.included_units.toLocaleString("en")} units a month</li>
              <li>{plan.calls_per_s} calls a second</li>
              <li>
                {usd(plan.overage_minor_per_1000)} for each 1,000 units beyond, only if you allow it, up to
                what you allow
              </li>
              <li>
                {plan.widgets === null ? "Widgets without limit" : `${plan.widgets} widgets`}, without our
                credit line
              </li>
              <li>{plan.team === null ? "A team of any size" : `A team of ${plan.team}`}</li>
            </ul>
            <Button look="primary" className="mt-6" busy={busy} onClick={() => onChoose(id)}>
              Choose {plan.name}
            </Button>
          </li>
        )
      })}
    </ul>
  )
}
