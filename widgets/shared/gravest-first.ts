import type { Caution } from "@/lib/chemistry/answer"

const severities = ["danger", "warning", "info"]

/** The cautions in the order in which they are to be read. */
export function gravestFirst(cautions: readonly Caution[]): Caution[] {
  return [...cautions].sort((a, b) => severities.indexOf(a.severity) - severities.indexOf(b.severity))
}
