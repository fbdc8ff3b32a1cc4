import { describe, expect, it } from "vitest"
import { csvColumns, readCsv } from "@/lib/catalog/csv"
import { itemErrors } from "@/lib/catalog/item"

const header =
  "kind,name,sku,price,currency,max_flow_l_h,max_head_m,pump_curve,body_diameter_mm,body_length_mm,method,max_volume_l"

describe("a catalogue's CSV", () => {
  it("gives its items, quoted names and curves among them", () => {
    const { items, errors } = readCsv(
      [
        header,
        'filter,"Canister ""Fern"", 1000",FH-1,189.00,USD,1000,1.6,,,,,',
        "filter,Measured canister,FH-2,,,,,0:1.6;500:1.2;1000:0,,,,",
        "reactor,Tube 60,FH-3,,,,,,60,350,,",
        "diffuser,Ceramic disc,FH-4,,,,,,,,diffuser,120",
      ].join("\r\n"),
    )
    expect(errors).toEqual([])
    expect(items.map(({ item }) => item)).toMatchObject([
      {
        kind: "filter",
        name: 'Canister "Fern", 1000',
        sku: "FH-1",
        price_minor: 18_900,
        currency: "USD",
        attributes: { max_flow_l_h: 1000, max_head_m: 1.6 },
      },
      {
        attributes: {
          pump_curve: [
            { flow_l_h: 0, head_m: 1.6 },
            { flow_l_h: 500, head_m: 1.2 },
            { flow_l_h: 1000, head_m: 0 },
          ],
        },
      },
      { kind: "reactor", attributes: { body_diameter_mm: 60, body_length_mm: 350 } },
      { kind: "diffuser", attributes: { method: "diffuser", max_volume_l: 120 } },
    ])
  })

  it.each([
    ["pump,Name,,,,,,,,,,", "kind"],
    ["filter,,,,,1000,1.6,,,,,", "name"],
    ["filter,Name,,,,a lot,1.6,,,,,", "max_flow_l_h"],
    ["filter,Name,,,,1000,60,,,,,", "max_head_m"],
    ["filter,Name,,,,1000,,,,,,", "pump_curve"],
    ["filter,Name,,,,,,0:1.6,,,,", "pump_curve"],
    ["filter,Name,,12,,1000,1.6,,,,,", "currency"],
    ["filter,Name,,,,1000,1.6,,60,,,", "body_diameter_mm"],
    ["reactor,Name,,,,,,,60,,,", "body_length_mm"],
    ["diffuser,Name,,,,,,,,,over there,120", "method"],
  ])("tells what is wrong with %s in the column %s", (line, column) => {
    const { items, errors } = readCsv(`${header}\n${line}\n`)
    expect(items).toEqual([])
    expect(errors.map((error) => [error.row, error.column])).toEqual([[2, column]])
    expect(errors[0]?.detail).toMatch(/^[A-Z"].*\.$/)
  })

  it("tells of a sku that stands twice, and keeps the first", () => {
    const { items, errors } = readCsv(`${header}\nreducer,One,A,,,,,,,,,\nreducer,Two,A,,,,,,,,,\n`)
    expect(items).toHaveLength(1)
    expect(errors).toEqual([{ row: 3, column: "sku", value: "A", detail: "Row 2 has the same sku." }])
  })

  it("refuses unknown columns, too many rows, and what is no CSV", () => {
    expect(() => readCsv("kind,name,colour\nother,A,red\n")).toThrow("colour")
    expect(() => readCsv(`kind,name\n${"other,A\n".repeat(5_001)}`)).toThrow("5000 rows")
    expect(() => readCsv('kind,name\n"other,A\n')).toThrow("cannot be read as CSV")
    expect(() => readCsv("name\nA\n")).toThrow("kind and name")
  })

  it("has the columns of every kind once", () => {
    expect(new Set(csvColumns).size).toBe(csvColumns.length)
    expect(csvColumns).toContain("cylinder_mass_g")
  })
})

describe("an item", () => {
  it("may not carry a number that its kind does not have", () => {
    expect(itemErrors({ kind: "reducer", name: "Reducer", attributes: { k: 1 } })).toMatchObject([
      { pointer: "/attributes/k" },
    ])
  })

  it("links to https alone", () => {
    const item = { kind: "other" as const, name: "Part", attributes: {} }
    expect(itemErrors({ ...item, url: "https://shop.example/a" })).toEqual([])
    expect(itemErrors({ ...item, url: "javascript:alert(1)" })).toMatchObject([{ pointer: "/url" }])
  })
})
