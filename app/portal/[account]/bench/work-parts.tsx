"use client"

import { CautionMark } from "@/app/ui/marks"
import type { Step } from "@/lib/plan/assembly"
import { Part } from "./part"
import type { Worked } from "./work-out"

/** What has to be bought, each part with what it must be able to do and why. */
export function PartsPart({ worked }: { worked: Worked }) {
  const { parts } = worked.plan.result
  return (
    <Part title="Parts list">
      <table className="w-full text-left text-sm">
        <caption className="sr-only">Parts of the system</caption>
        <thead>
          <tr className="text-soft">
            <th scope="col" className="w-10 py-1.5 pr-3 font-medium">
              <span className="sr-only">Count</span>
            </th>
            <th scope="col" className="py-1.5 pr-6 font-medium">
              What
            </th>
            <th scope="col" className="hidden py-1.5 font-medium @min-[40rem]:table-cell">
              Why
            </th>
          </tr>
        </thead>
        <tbody>
          {parts.map(({ part, count, requirement, reason }) => (
            <tr key={part} className="border-t border-line align-top">
              <td className="py-2 pr-3 text-right font-mono">{count}</td>
              <td className="py-2 pr-6">
                {requirement}
                <span className="block text-soft @min-[40rem]:hidden">{reason}</span>
              </td>
              <td className="hidden w-2/5 py-2 text-soft @min-[40rem]:table-cell">{reason}</td>
            </tr>
          ))}
        </tbody>
      </table>
    </Part>
  )
}

/** How it is put together and first run. */
export function AssemblyPart({ worked }: { worked: Worked }) {
  const { assembly, commissioning } = worked.plan.result
  return (
    <Part title="Assembly and first run" isOpen={false}>
      <Steps title="Assembly" steps={assembly} />
      <Steps title="First run" steps={commissioning} />
    </Part>
  )
}

function Steps({ title, steps }: { title: string; steps: readonly Step[] }) {
  return (
    <section aria-label={title}>
      <h3 className="font-semibold">{title}</h3>
      <ol className="mt-2 max-w-measure list-decimal space-y-2 pl-6 marker:font-mono marker:text-sm marker:text-soft">
        {steps.map(({ code, text }) => (
          <li key={code} className="pl-1">
            {text}
          </li>
        ))}
      </ol>
    </section>
  )
}

/** What keeps it running. */
export function CarePart({ worked }: { worked: Worked }) {
  return (
    <Part title="Maintenance" isOpen={false}>
      <dl className="divide-y divide-line border-y border-line">
        {worked.plan.result.maintenance.map(({ code, when, text }) => (
          <div key={code} className="grid gap-x-6 gap-y-1 py-3 @min-[40rem]:grid-cols-[14rem_minmax(0,1fr)]">
            <dt className="text-sm text-soft">{when}</dt>
            <dd>{text}</dd>
          </div>
        ))}
      </dl>
    </Part>
  )
}

/** What may go wrong in this system, what kills first. */
export function TroublePart({ worked }: { worked: Worked }) {
  return (
    <Part title="Troubleshooting" isOpen={false}>
      <ul className="space-y-6">
        {worked.plan.result.troubleshooting.map(({ code, severity, symptom, actions }) => (
          <li key={code}>
            <p className={`flex gap-2 font-semibold ${severity === "danger" ? "text-danger" : ""}`}>
              {severity === "danger" && <CautionMark className="mt-1 size-4" />}
              {symptom}
            </p>
            <ol className="mt-2 max-w-measure list-decimal space-y-1 pl-6 marker:font-mono marker:text-sm marker:text-soft">
              {actions.map((action) => (
                <li key={action}>{action}</li>
              ))}
            </ol>
          </li>
        ))}
      </ul>
    </Part>
  )
}

/** What the plan takes for granted, and where its numbers come from. */
export function BasisPart({ worked }: { worked: Worked }) {
  const { assumptions, method } = worked.plan
  return (
    <Part title="What this rests on" isOpen={false}>
      <ul className="max-w-measure list-['–_'] space-y-1.5 pl-4">
        {assumptions.map(({ code, message }) => (
          <li key={code}>{message}</li>
        ))}
      </ul>
      <section aria-label="Sources">
        <h3 className="font-semibold">Sources</h3>
        <ul className="mt-2 max-w-measure space-y-1 text-sm text-soft">
          {method.sources.map(({ title, year, detail }) => (
            <li key={`${title} ${detail}`}>
              {title} ({year}). {detail}
            </li>
          ))}
        </ul>
        <p className="mt-3 font-mono text-xs text-soft">Engine {method.version}</p>
      </section>
    </Part>
  )
}
