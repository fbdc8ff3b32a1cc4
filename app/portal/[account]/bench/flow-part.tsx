"use client"

import { closeColumns, Figure, FigureRow } from "@/app/ui/figure"
import { PumpPlot } from "@/app/ui/plots/pump-plot"
import { type ElementKind, elementTable } from "@/lib/flow/elements"
import type { ReactorAnswer } from "@/lib/flow/reactor-verdict"
import type { Reading } from "@/lib/units/format"
import { CloggingScale } from "./clogging-scale"
import { amount, cautionsBeside, Part, planCodes, said, span } from "./part"
import { VerdictWord } from "./verdict-word"
import type { Worked } from "./work-out"

/** What the filter really moves, where its head goes, and whether a reactor works in this loop and until when. */
export function FlowPart({ worked, reading }: { worked: Worked; reading: Reading }) {
  const { plan } = worked
  const { flow, method, minimum_filter, reactor, reactor_size } = plan.result
  const isReactor = method.name === "inline_reactor"
  const { flow_low_l_h, flow_high_l_h } = plan.uncertainty.flow
  const cautions = cautionsBeside(worked, isReactor ? ["flow", "reactor"] : ["flow"], planCodes.reactor)
  return (
    <Part title="Flow and reactor" cautions={cautions}>
      <FigureRow columns={closeColumns}>
        <Figure
          label="Real flow"
          {...amount(reading, flow.flow_l_h, "flow_l_h")}
          under={span(reading, flow_low_l_h, flow_high_l_h, "flow_l_h", 3)}
        />
        <Figure
          label="The tank an hour"
          value={flow.turnover_per_h?.toPrecision(2)}
          unit="times"
          under={flow.turnover_level}
        />
        <Figure
          label="Due for cleaning"
          {...amount(reading, flow.due_flow_l_h, "flow_l_h")}
          under="with loaded media"
        />
        <Figure
          label="Least filter, by its box"
          value={
            minimum_filter.max_flow_l_h === null
              ? "none"
              : amount(reading, minimum_filter.max_flow_l_h, "max_flow_l_h", 2).value
          }
          unit={
            minimum_filter.max_flow_l_h === null
              ? undefined
              : amount(reading, minimum_filter.max_flow_l_h, "max_flow_l_h", 2).unit
          }
          under={
            minimum_filter.max_head_m === null
              ? "the hose is too narrow"
              : `and ${said(reading, minimum_filter.max_head_m, "max_head_m", 2)}; this one ${minimum_filter.present_is_enough ? "is enough" : "is too small"}`
          }
        />
      </FigureRow>
      <PumpPlot flow={flow} reading={reading} />
      <HeadBudget worked={worked} reading={reading} />
      <Verdict reactor={reactor} isPlanned={isReactor} />
      <p className="text-sm text-soft">
        Judged: a body of {said(reading, reactor_size.body_diameter_mm, "body_diameter_mm")} bore and{" "}
        {said(reading, reactor_size.body_length_mm, "body_length_mm")} length
        {worked.input.equipment?.reactor ? ", as given." : ", the smallest that would serve."}
      </p>
    </Part>
  )
}

function Verdict({ reactor, isPlanned }: { reactor: ReactorAnswer; isPlanned: boolean }) {
  const worse = reactor.when_due.reasons.filter(({ verdict }) => verdict !== "suitable")
  return (
    <section aria-label="Verdict on a reactor">
      <h3 className="flex flex-wrap items-baseline gap-x-3 font-semibold">
        {isPlanned ? "The reactor in this loop" : "A reactor in this loop would be"}
        <VerdictWord verdict={reactor.verdict} />
      </h3>
      <Reasons reasons={reactor.reasons} />
      <h3 className="mt-5 flex flex-wrap items-baseline gap-x-3 font-semibold">
        When the filter is due for cleaning
        <VerdictWord verdict={reactor.when_due.verdict} />
      </h3>
      {worse.length > 0 ? (
        <Reasons reasons={worse} />
      ) : (
        <p className="mt-2 text-sm">All of that still holds at {reactor.when_due.flow_l_h.toFixed(0)} L/h.</p>
      )}
      <div className="mt-5">
        <CloggingScale reactor={reactor} />
      </div>
    </section>
  )
}

function Reasons({ reasons }: { reasons: ReactorAnswer["reasons"] }) {
  return (
    <ul className="mt-2 divide-y divide-line border-y border-line text-sm">
      {reasons.map(({ criterion, verdict, message }) => (
        <li
          key={criterion}
          className="grid items-start gap-x-4 py-2 @min-[36rem]:grid-cols-[7rem_minmax(0,1fr)]"
        >
          <VerdictWord verdict={verdict} />
          <span>{message}</span>
        </li>
      ))}
    </ul>
  )
}

/** An element of the loop in words: by the table of fittings, or by its own name. */
function labelOf(element: string): string {
  return element in elementTable ? elementTable[element as ElementKind].label : element.replaceAll("_", " ")
}

function HeadBudget({ worked, reading }: { worked: Worked; reading: Reading }) {
  const { flow } = worked.plan.result
  const most = Math.max(...flow.head_budget.map(({ head_m }) => head_m))
  const sorted = [...flow.head_budget].sort((a, b) => b.head_m - a.head_m)
  return (
    <section aria-label="Where the pump's head goes">
      <h3 className="font-semibold">
        Where the pump's {said(reading, flow.head_m, "head_m", 2)} of head goes
      </h3>
      <table className="mt-2 w-full text-sm">
        <tbody>
          {sorted.map(({ element, head_m }) => (
            <tr key={element} className="border-t border-line">
              <th scope="row" className="w-44 py-1 pr-4 text-left font-normal first-letter:uppercase">
                {labelOf(element)}
              </th>
              <td className="py-1 pr-4" aria-hidden="true">
                <span className="block h-2 bg-action" style={{ width: `${(100 * head_m) / most}%` }} />
              </td>
              <td className="w-24 py-1 text-right font-mono whitespace-nowrap">
                {said(reading, head_m, "head_m", 2)}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  )
}
