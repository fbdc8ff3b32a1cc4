import { strToU8, type Zippable, zipSync } from "fflate"
import { type CsvValue, csvOf } from "@/lib/csv"

export type Row = Readonly<Record<string, unknown>>

/** What a file of the archive is called, its columns in their order, and its rows. */
export interface Part {
  readonly name: string
  readonly columns: readonly string[]
  readonly rows: readonly Row[]
}

/** A zip file that holds each part twice: as JSON for programs, and as CSV for people. */
export function archiveOf(parts: readonly Part[], about: string): Uint8Array {
  const files: Zippable = { "README.txt": strToU8(about) }
  for (const { name, columns, rows } of parts) {
    files[`json/${name}.json`] = strToU8(`${JSON.stringify(rows, null, 2)}\n`)
    const cells = rows.map((row) => columns.map((column) => cellOf(row[column])))
    files[`csv/${name}.csv`] = strToU8(csvOf(columns, cells))
  }
  return zipSync(files, { level: 6 })
}

function cellOf(value: unknown): CsvValue {
  if (value === null || value === undefined) return null
  if (typeof value === "string" || typeof value === "number") return value
  if (value instanceof Date) return value.toISOString()
  return Array.isArray(value) ? value.join(" ") : JSON.stringify(value)
}
