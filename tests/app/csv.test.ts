import { parse } from "csv-parse/sync"
import { describe, expect, it } from "vitest"
import { csvOf } from "@/lib/csv"

describe("an exported table", () => {
  it("is read back by an independent reader as it was", () => {
    const rows = [
      ["Fernhollow, the shop", 12.5],
      ['a "quoted" name', 0],
      ["two\r\nlines", 3],
    ] as const
    const read = parse(csvOf(["name", "units"], rows), { columns: true })
    expect(read).toEqual(rows.map(([name, units]) => ({ name, units: String(units) })))
  })

  it.each(["=1+1", "+1", "-1", "@SUM(A1)", "\tx"])(
    "defuses the formula %j and leaves numbers alone",
    (text) => {
      expect(parse(csvOf(["a", "b"], [[text, -1.5]]))).toEqual([
        ["a", "b"],
        [`'${text}`, "-1.5"],
      ])
    },
  )
})
