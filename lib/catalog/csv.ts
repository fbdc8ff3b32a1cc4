import { parse } from "csv-parse/sync"
import { TarnwrightError } from "@/lib/errors"
import { type CurvePoint, type ItemAttributes, itemErrors, type NewItem } from "./item"
import { type ItemKind, itemKindNames, itemKinds } from "./kinds"

/** Largest file and most rows of an import. */
export const CSV_LIMIT_BYTES = 5 * 1024 * 1024
export const CSV_LIMIT_ROWS = 5_000

const own = ["kind", "name", "sku", "url", "price", "currency"] as const
const numbers = [
  ...new Set(Object.values(itemKinds).flatMap(({ attributes }) => attributes.map(({ name }) => name))),
]

/** The columns of a catalogue's CSV, in the order of the template. */
export const csvColumns = [...own, ...numbers, "method", "pump_curve"] as const

export interface RowError {
  /** As a spreadsheet counts: the header is row 1. */
  readonly row: number
  readonly column: string
  /** What stands in the cell. */
  readonly value: string
  readonly detail: string
}

export interface ReadCsv {
  readonly items: { readonly row: number; readonly item: NewItem }[]
  readonly errors: RowError[]
}

/**
 * The items of a CSV file (RFC 4180, header first, decimal points), and what is wrong row by row.
 *
 * @throws TarnwrightError `validation_failed` when it is no CSV, has unknown columns or too many rows.
 */
export function readCsv(text: string): ReadCsv {
  const [header = [], ...rows] = tableOf(text)
  const unknown = header.filter((column) => !(csvColumns as readonly string[]).includes(column))
  if (unknown.length > 0) {
    throw refused(`There are no columns ${unknown.join(", ")}. The columns are ${csvColumns.join(", ")}.`)
  }
  if (!header.includes("kind") || !header.includes("name"))
    throw refused("The columns kind and name are needed.")
  if (rows.length > CSV_LIMIT_ROWS) {
    throw refused(`A file may have ${CSV_LIMIT_ROWS} rows; this one has ${rows.length}. Split it.`)
  }
  const read: ReadCsv = { items: [], errors: [] }
  const rowOfSku = new Map<string, number>()
  rows.forEach((cells, index) => {
    const row = index + 2
    const record = Object.fromEntries(header.map((column, at) => [column, (cells[at] ?? "").trim()]))
    const { item, errors } = itemFrom(record)
    const twin = item?.sku ? rowOfSku.get(item.sku) : undefined
    if (twin) errors.push({ column: "sku", detail: `Row ${twin} has the same sku.` })
    if (item?.sku) rowOfSku.set(item.sku, twin ?? row)
    if (item && errors.length === 0) read.items.push({ row, item })
    read.errors.push(
      ...errors.map((error) => ({ row, value: (record[error.column] ?? "").slice(0, 80), ...error })),
    )
  })
  return read
}

function tableOf(text: string): string[][] {
  try {
    return parse(text, { bom: true, skip_empty_lines: true, relax_column_count: true })
  } catch (error) {
    throw refused(`The file cannot be read as CSV: ${(error as Error).message}`)
  }
}

type CellError = Pick<RowError, "column" | "detail">

function itemFrom(record: Record<string, string>): { item?: NewItem; errors: CellError[] } {
  const kind = itemKindNames.find((name) => name === record.kind)
  if (!kind) return { errors: [{ column: "kind", detail: `The kinds are ${itemKindNames.join(", ")}.` }] }
  const errors: CellError[] = []
  const attributes = attributesFrom(kind, record, errors)
  const price = record.price ? numberFrom("price", record.price, errors) : undefined
  const item: NewItem = {
    kind,
    name: record.name ?? "",
    sku: record.sku || null,
    url: record.url || null,
    price_minor: price === undefined ? null : Math.round(price * 100),
    currency: record.currency || null,
    attributes,
  }
  // A number that could not be read is not also told as one that is missing.
  const unread = errors.length > 0
  for (const { pointer, detail } of itemErrors(item)) {
    if (unread && pointer.startsWith("/attributes")) continue
    if (pointer === "/price_minor" && record.price) continue
    errors.push({ column: pointer.split("/").at(-1)?.replace("price_minor", "price") ?? "", detail })
  }
  return { item, errors }
}

function attributesFrom(kind: ItemKind, record: Record<string, string>, errors: CellError[]): ItemAttributes {
  const attributes: Record<string, number | string | CurvePoint[]> = {}
  for (const name of numbers) {
    if (!record[name]) continue
    const value = numberFrom(name, record[name], errors)
    if (value !== undefined) attributes[name] = value
  }
  if (record.method) attributes.method = record.method
  if (record.pump_curve) {
    const points = record.pump_curve.split(";").map((point) => point.split(":").map(Number))
    attributes.pump_curve = points.map(([flow_l_h = Number.NaN, head_m = Number.NaN]) => ({
      flow_l_h,
      head_m,
    }))
  }
  // An empty cell of another kind's column is no attribute; a filled one is told as one too many.
  return kind === "filter" || !record.pump_curve ? attributes : { ...attributes, pump_curve: "" }
}

function numberFrom(column: string, text: string, errors: CellError[]): number | undefined {
  const value = Number(text)
  if (Number.isFinite(value)) return value
  errors.push({
    column,
    detail: `"${text.slice(0, 40)}" is no number. Write it with a decimal point and no unit.`,
  })
  return undefined
}

function refused(detail: string): TarnwrightError {
  return new TarnwrightError("validation_failed", detail, { errors: [{ pointer: "/csv", detail }] })
}
