import { ButtonLink } from "@/app/ui/button"
import { usd } from "@/app/ui/money"
import { type Plan, type PlanId, plans } from "@/lib/billing/plans"

const rows: readonly { readonly label: string; value(plan: Plan): string }[] = [
  { label: "Units a month", value: ({ included_units }) => included_units.toLocaleString("en") },
  {
    label: "Beyond them",
    value: ({ overage_minor_per_1000 }) =>
      overage_minor_per_1000 === null
        ? "stops, answering 402"
        : `if you allow it: ${usd(overage_minor_per_1000)} for 1,000, up to your own cap`,
  },
  { label: "Calls a second", value: ({ calls_per_s }) => String(calls_per_s) },
  {
    label: "Widgets",
    value: ({ widgets, credit_line }) =>
      `${widgets ?? "no limit"}${credit_line ? ", with our credit line" : ", without our name"}`,
  },
  { label: "People in the team", value: ({ team }) => (team === null ? "no limit" : String(team)) },
]

/** The plans side by side, from the one table that bills by them. */
export function PlanTable() {
  return (
    // biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls must be reachable by keyboard
    <section aria-label="Plans" tabIndex={0} className="relative overflow-x-auto">
      <table className="w-full min-w-2xl border-y border-line text-left">
        <thead>
          <tr className="align-bottom">
            <td className="w-44" />
            {Object.entries(plans).map(([id, { name, price_minor }]) => (
              <th key={id} scope="col" className="py-5 pr-6 font-normal">
                <span className="block text-lg font-semibold">{name}</span>
                <span className="font-mono text-2xl font-medium">{usd(price_minor)}</span>{" "}
                <span className="text-sm text-soft">a month</span>
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map(({ label, value }) => (
            <tr key={label} className="border-t border-line align-top">
              <th scope="row" className="py-2.5 pr-6 text-sm font-normal text-soft">
                {label}
              </th>
              {(Object.keys(plans) as PlanId[]).map((id) => (
                <td key={id} className="py-2.5 pr-6 text-sm">
                  {value(plans[id])}
                </td>
              ))}
            </tr>
          ))}
          <tr className="border-t border-line">
            <td />
            {(Object.keys(plans) as PlanId[]).map((id) => (
              <td key={id} className="py-5 pr-6">
                <ButtonLink href="/signup" look={id === "nano" ? "primary" : "plain"} small>
                  {id === "nano" ? "Begin free" : "Begin free, then choose"}
                </ButtonLink>
              </td>
            ))}
          </tr>
        </tbody>
      </table>
    </section>
  )
}
