import { basename } from "node:path"
import { type Deviation, passes, type ReferenceFormat } from "./format"
import { checkFile } from "./read"

/**
 * The engine against one file, as a table with a line for each kind and quantity, and how many comparisons and rows
 * failed. A file that cannot be read counts as one.
 */
export function reportFile(
  file: string,
  formats: readonly ReferenceFormat[],
): { readonly text: string; readonly failures: number } {
  try {
    const { format, rows, deviations, problems } = checkFile(file, formats)
    const lines = [`${basename(file)}: ${format}, ${rows} rows`, table(byQuantity(deviations))]
    lines.push(...problems.map((problem) => `  not checked  ${problem}`))
    return {
      text: lines.join("\n"),
      failures: problems.length + deviations.filter((d) => !passes(d)).length,
    }
  } catch (error) {
    return { text: `${basename(file)}: ${(error as Error).message}`, failures: 1 }
  }
}

interface Line {
  readonly kind: string
  readonly quantity: string
  rows: number
  failed: number
  worst: Deviation
}

function byQuantity(deviations: readonly Deviation[]): Line[] {
  const lines = new Map<string, Line>()
  for (const d of deviations) {
    const key = `${d.kind}\t${d.quantity}`
    const line = lines.get(key) ?? { kind: d.kind, quantity: d.quantity, rows: 0, failed: 0, worst: d }
    line.rows += 1
    if (!passes(d)) line.failed += 1
    if (share(d) > share(line.worst)) line.worst = d
    lines.set(key, line)
  }
  return [...lines.values()].sort((a, b) => a.kind.localeCompare(b.kind))
}

/** How much of its tolerance a deviation uses. */
function share(d: Deviation): number {
  return d.deviation === 0 ? 0 : d.deviation / d.tolerance
}

function table(lines: readonly Line[]): string {
  const head = ["kind", "quantity", "rows", "worst", "tolerance", "verdict"]
  const body = lines.map(({ kind, quantity, rows, failed, worst }) => [
    kind,
    quantity,
    String(rows),
    amount(worst.deviation, worst.relative),
    amount(worst.tolerance, worst.relative),
    failed === 0 ? "pass" : `${failed} FAIL`,
  ])
  const widths = head.map((_, column) => Math.max(...[head, ...body].map((row) => row[column]!.length)))
  const line = (row: readonly string[]) => row.map((cell, i) => cell.padEnd(widths[i]!)).join("  ")
  return [head, ...body].map((row) => `  ${line(row).trimEnd()}`).join("\n")
}

function amount(value: number, relative: boolean): string {
  const digits = Number((relative ? value * 100 : value).toPrecision(3))
  return relative ? `${digits} %` : String(digits)
}
