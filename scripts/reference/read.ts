import { readFileSync } from "node:fs"
import { parse } from "csv-parse/sync"
import { BadRow, type Deviation, type ReferenceFormat, type Row } from "./format"

export interface FileReport {
  readonly file: string
  readonly format: string
  readonly rows: number
  readonly deviations: readonly Deviation[]
  /** Rows that could not be checked, in words. */
  readonly problems: readonly string[]
}

/**
 * Runs the engine on every row of one reference file.
 *
 * Throws {@link BadRow} when the file cannot be read, has no rows, or has columns that no format knows.
 */
export function checkFile(file: string, formats: readonly ReferenceFormat[]): FileReport {
  const rows = readRows(file)
  const header = Object.keys(rows[0]!)
  const format = formats.find((candidate) => candidate.recognises(header))
  if (!format) throw new BadRow(`no format has the columns ${header.join(", ")}`)
  const deviations: Deviation[] = []
  const problems: string[] = []
  rows.forEach((row, index) => {
    try {
      const found = format.check(row)
      if (found.length === 0) throw new BadRow("nothing to compare")
      deviations.push(...found)
    } catch (error) {
      problems.push(`${row.id || `row ${index + 1}`}: ${(error as Error).message}`)
    }
  })
  return { file, format: format.name, rows: rows.length, deviations, problems }
}

/** The rows of a reference file. Throws {@link BadRow} when it cannot be read. */
export function readRows(file: string): Row[] {
  let rows: Row[]
  try {
    rows = parse(readFileSync(file), {
      bom: true,
      columns: true,
      comment: "#",
      comment_no_infix: true,
      skip_empty_lines: true,
      trim: true,
    })
  } catch (error) {
    throw new BadRow(`cannot be read: ${(error as Error).message}`)
  }
  if (rows.length === 0) throw new BadRow("has no rows")
  return rows
}
