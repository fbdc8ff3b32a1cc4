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
      "The CO2 level widget, as a custom element and as a frame.",
      "Portal with explorer, usage by day, billing and team.",
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
