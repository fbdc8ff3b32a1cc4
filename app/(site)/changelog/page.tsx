import type { Metadata } from "next"
import { PageHead, Section } from "@/app/ui/sheet"

export const metadata: Metadata = { title: "Changes" }

const releases = [
  {
    version: "2026.12.1",
    day: "1 Dec 2026",
    changes: [
      "The carbonate calculations: CO2 from pH and KH, the set-point, KH from CO2 and pH, the pH drop, the drop checker, the grid.",
      "Server and browser keys, sandbox and live, with rotation and revocation that takes effect within two seconds.",
      "Gas, flow and the whole plan of a system; batches of 100.",
      "Reports that are kept as they were calculated, as JSON, as a page to share and as a PDF.",
      "Your own catalogue of parts, by hand or from a CSV file, matched to a tank.",
      "Webhooks, signed after the Standard Webhooks specification, with their deliveries and replay.",
      "The CO2 level widget, as a custom element and as a frame, with questions to the shop by consent.",
      "Portal: the Bench for the counter, explorer, request log, usage, catalogue, reports, enquiries, insights, team, billing and audit.",
    ],
  },
]

export default function Changelog() {
  return (
    <>
      <PageHead
        title="Changes"
        lead="Within a major version only additions. What goes is announced at least six months before, in the answers themselves and here."
      />
      {releases.map(({ version, day, changes }) => (
        <Section key={version} title={version} note={day}>
          <ul className="prose list-none">
            {changes.map((change) => (
              <li key={change}>{change}</li>
            ))}
          </ul>
        </Section>
      ))}
    </>
  )
}
