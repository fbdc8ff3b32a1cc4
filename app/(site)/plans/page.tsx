import type { Metadata } from "next"
import Link from "next/link"
import { PageHead, Section } from "@/app/ui/sheet"
import { PlanTable } from "../plan-table"

export const metadata: Metadata = { title: "Plans" }

const costs = [
  ["A calculation", "1 unit"],
  ["A simulation, a grid, a flow", "2 units"],
  ["A widget session: all that one shopper works out on one page view", "2 units"],
  ["A whole plan", "5 units"],
  ["A stored report", "10 units"],
  ["A batch", "the sum of its calls"],
  ["A call that fails", "nothing"],
  ["Anything in the sandbox", "nothing"],
] as const

export default function Plans() {
  return (
    <>
      <PageHead
        title="Plans"
        lead="Begin free. Change or end a plan at any time; a period that was paid runs to its end."
      />
      <PlanTable />
      <div className="h-12" />
      <Section title="What a unit buys" note="Prices in US dollars, without tax.">
        <dl className="max-w-measure divide-y divide-line border-y border-line">
          {costs.map(([what, units]) => (
            <div key={what} className="flex justify-between gap-6 py-2.5">
              <dt>{what}</dt>
              <dd className="font-mono text-sm whitespace-nowrap">{units}</dd>
            </div>
          ))}
        </dl>
      </Section>
      <Section title="When the units end" note="No bill can surprise you.">
        <div className="prose">
          <p>
            At 80 and at 100 percent the owners get a mail. Then calls answer{" "}
            <Link href="/docs/errors/quota_reached">402 quota_reached</Link> until the next period. On a paid
            plan an owner can allow units beyond it, up to an amount in dollars that they set; it is never
            passed.
          </p>
        </div>
      </Section>
    </>
  )
}
