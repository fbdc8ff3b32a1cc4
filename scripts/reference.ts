/**
 * Runs the engine on files of reference values and prints how far it is from them:
 *
 *     npm run reference                  the files of tests/reference
 *     npm run reference -- FILE…         any files with the same columns, rows in any order
 *
 * Ends with 1 when a row is outside its tolerance, when a kind is unknown, or when a file cannot be read.
 */
import { readdirSync } from "node:fs"
import { basename, join } from "node:path"
import { carbonate, carbonatePublished } from "./reference/carbonate"
import type { Deviation, ReferenceFormat } from "./reference/format"
import { passes } from "./reference/format"
import { checkFile } from "./reference/read"

const formats: readonly ReferenceFormat[] = [carbonate, carbonatePublished]

const given = process.argv.slice(2)
const files = given.length > 0 ? given : shippedFiles()
const failures = files.reduce((sum, file) => sum + report(file), 0)
console.log(failures === 0 ? "All rows pass." : `${failures} failed.`)
process.exitCode = failures === 0 && files.length > 0 ? 0 : 1

function shippedFiles(): string[] {
  const folder = join(import.meta.dirname, "../tests/reference")
  return readdirSync(folder)
    .filter((name) => name.endsWith(".csv"))
    .sort()
    .map((name) => join(folder, name))
}

/** Prints the table of one file; returns the number of comparisons and rows that failed. */
function report(file: string): number {
  try {
    const { format, rows, deviations, problems } = checkFile(file, formats)
    console.log(`\n${basename(file)}: ${format}, ${rows} rows`)
    console.log(table(byQuantity(deviations)))
    for (const problem of problems) console.log(`  not checked  ${problem}`)
    return problems.length + deviations.filter((d) => !passes(d)).length
  } catch (error) {
    console.log(`\n${basename(file)}: ${(error as Error).message}`)
    return 1
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
