import type { Metadata } from "next"
import { PageHead, Section } from "@/app/ui/sheet"
import type { Source } from "@/lib/chemistry/sources"
import { carbonateSources } from "@/lib/chemistry/sources-carbonate"
import { flowSources } from "@/lib/chemistry/sources-flow"
import { gasSources } from "@/lib/chemistry/sources-gas"

export const metadata: Metadata = { title: "The science" }

const rooms: readonly {
  readonly title: string
  readonly note: string
  readonly sources: Record<string, Source>
}[] = [
  { title: "Water", note: "The carbonate system: pH, hardness, CO2.", sources: carbonateSources },
  { title: "Gas", note: "From the cylinder to the plants and the room.", sources: gasSources },
  { title: "Flow", note: "Filter, hose, reactor.", sources: flowSources },
]

export default function Science() {
  return (
    <>
      <PageHead
        title="The science"
        lead="Where each number comes from. An answer names those of its own calculation under method.sources."
      />
      <Section title="How sure">
        <div className="prose">
          <p>
            CO2 from pH and KH goes with ten to the power of the pH: a meter that is off by 0.1 shifts it by a
            quarter. So every such answer carries an interval that is wider above than below, from the
            standard errors of your own meter, test kit and thermometer, and the level is judged by its upper
            end.
          </p>
          <p>
            What no source covers is named in the answer: a value outside the range that a method was tested
            in is refused or flagged, never silently cut.
          </p>
        </div>
      </Section>
      <Section title="Its limits">
        <div className="prose">
          <p>
            A pH reading proves CO2 only where carbonate is the one buffer. Phosphate, humic acids from peat
            and wood, and other acids shift the reading; a drop checker with water of known hardness does not
            see them. Facts of the trade that nobody published are marked as common practice.
          </p>
        </div>
      </Section>
      {rooms.map(({ title, note, sources }) => (
        <Section key={title} title={title} note={note}>
          <ul className="divide-y divide-line border-y border-line">
            {Object.entries(sources).map(([id, source]) => (
              <li key={id} id={id} className="grid gap-x-6 py-2.5 sm:grid-cols-[3.5rem_minmax(0,1fr)]">
                <span className="font-mono text-sm text-soft">{source.year}</span>
                <span>
                  <cite className="not-italic">{source.title}</cite>
                  <span className="block text-sm text-soft">{source.detail}</span>
                </span>
              </li>
            ))}
          </ul>
        </Section>
      ))}
    </>
  )
}
