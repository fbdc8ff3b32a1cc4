import { SchematicDrawing } from "@/app/ui/schematic/drawing"
import type { Caution } from "@/lib/chemistry/answer"
import { type Line, type SharedReport, type SheetList, sheetOf } from "@/lib/reports"
import { Notice } from "../ui/notice"
import { Section } from "../ui/sheet"
import { disclaimer } from "./words"

/** A report on the screen: as it stands on paper, on one page that prints. */
export function SheetView({ report }: { report: Pick<SharedReport, "kind" | "answer" | "engine_version"> }) {
  const { answer, engine_version } = report
  const sheet = sheetOf(report)
  const dangers = answer.cautions.filter(isDanger) as Caution[]
  return (
    <>
      <Section title="The answer" note="With the interval that the readings allow, 95 %.">
        <Lines lines={sheet.answer} large />
        {dangers.length > 0 && <Beside cautions={dangers} />}
      </Section>
      {sheet.schematic && (
        <Section title="The system" note="Each number stands where it belongs.">
          <SchematicDrawing schematic={sheet.schematic} />
        </Section>
      )}
      <Section title="Worked out from">
        <Lines lines={sheet.given} />
      </Section>
      {sheet.parts.map(({ title, lines, cautions }) => (
        <Section key={title} title={title}>
          <Lines lines={lines} />
          <Beside cautions={cautions.filter((caution) => !isDanger(caution))} />
        </Section>
      ))}
      {sheet.cautions.some((caution) => !isDanger(caution)) && (
        <Section title="To know beside it">
          <Beside cautions={sheet.cautions.filter((caution) => !isDanger(caution))} />
        </Section>
      )}
      {sheet.lists.map((list) => (
        <Section key={list.title} title={list.title}>
          <List list={list} />
        </Section>
      ))}
      <Section title="Taken for granted" note={`Tarnwright engine ${engine_version}.`}>
        <ul className="max-w-measure space-y-1.5 text-sm">
          {answer.assumptions.map(({ code, message }) => (
            <li key={code}>{message}</li>
          ))}
        </ul>
        <details className="mt-6 text-sm">
          <summary className="link">Sources</summary>
          <ul className="mt-3 max-w-measure space-y-1.5">
            {answer.method.sources.map(({ title, year, detail }) => (
              <li key={title}>
                {title} ({year}). <span className="text-soft">{detail}</span>
              </li>
            ))}
          </ul>
        </details>
        <p className="mt-6 max-w-measure text-sm text-soft">{disclaimer}</p>
      </Section>
    </>
  )
}

function isDanger({ severity }: { severity: string }): boolean {
  return severity === "danger"
}

function Beside({ cautions }: { cautions: readonly Caution[] }) {
  return (
    <div className="mt-5 space-y-4">
      {cautions.map(({ code, severity, message }) => (
        <div key={code} className="break-inside-avoid">
          <Notice severity={severity}>{message}</Notice>
        </div>
      ))}
    </div>
  )
}

function Lines({ lines, large = false }: { lines: readonly Line[]; large?: boolean }) {
  return (
    <dl className="max-w-3xl">
      {lines.map(({ name, metric, us }) => (
        <div
          key={name}
          className="grid break-inside-avoid gap-x-6 border-t border-line py-2 first:border-t-0 sm:grid-cols-[16rem_minmax(0,1fr)_minmax(0,0.8fr)] print:grid-cols-[14rem_minmax(0,1fr)_minmax(0,0.8fr)]"
        >
          <dt>{name}</dt>
          <dd className={large ? "font-mono font-medium" : "font-mono text-sm"}>{metric}</dd>
          {us && <dd className="font-mono text-sm text-soft">{us}</dd>}
        </div>
      ))}
    </dl>
  )
}

function List({ list: { items } }: { list: SheetList }) {
  return (
    <ol className="max-w-3xl">
      {items.map(({ lead, text }, index) => (
        <li
          key={`${lead} ${text}`}
          className="grid break-inside-avoid gap-x-6 border-t border-line py-2 first:border-t-0 sm:grid-cols-[10rem_minmax(0,1fr)]"
        >
          <span className={lead ? "font-semibold" : "font-mono text-sm text-soft"}>{lead ?? index + 1}</span>
          <span>{text}</span>
        </li>
      ))}
    </ol>
  )
}
