/** One value of a table. A number stays a number. */
export type CsvValue = string | number | null

/**
 * Rows as RFC 4180 text. Text that a spreadsheet would take for a formula gets an apostrophe before it; a number is
 * written as it is, so that −1.5 stays one. @source PLATFORM 6.4
 */
export function csvOf(header: readonly string[], rows: readonly (readonly CsvValue[])[]): string {
  return [header, ...rows].map((row) => `${row.map(cell).join(",")}\r\n`).join("")
}

function cell(value: CsvValue): string {
  if (typeof value === "number") return String(value)
  const text = /^[=+\-@\t\0\r]/.test(value ?? "") ? `'${value}` : (value ?? "")
  return /[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text
}
