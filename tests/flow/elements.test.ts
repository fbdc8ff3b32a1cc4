import { describe, expect, test } from "vitest"
import {
  barbLoss,
  contractionLoss,
  type ElementRow,
  elementKinds,
  elementTable,
  expansionLoss,
  lossOf,
} from "@/lib/flow/elements"

describe("losses from geometry", () => {
  test("a sudden widening of 1 to 2 costs 0.5625 (Borda-Carnot; P20)", () => {
    expect(expansionLoss(0.5)).toBeCloseTo(0.5625, 12)
  })

  test("a sudden narrowing of 2 to 1 costs 0.375 (Crane TP-410; P21)", () => {
    expect(contractionLoss(0.5)).toBeCloseTo(0.375, 12)
  })

  test.each([
    [0.85, 0.41],
    [0.8, 0.76],
    [0.75, 1.3],
    [0.7, 2.14],
  ])("a barb of %d of the hose's bore costs %d (design table of barbs)", (ratio, k) => {
    // One unit of the last printed digit: the table cuts 2.145 to 2.14.
    expect(Math.abs(barbLoss(ratio) - k)).toBeLessThan(0.01)
  })

  test("20 holes of 3 mm on a 16 mm hose cost 5.3 (design table, orifice coefficient 0.62)", () => {
    const holes = { kind: "spray_bar", hole_count: 20, hole_diameter_mm: 3 } as const
    expect(lossOf(holes, 16, 0).k).toBeCloseTo(5.3, 1)
  })
})

describe("the table of elements", () => {
  test.each(elementKinds)("%s has its typical loss inside its range, a label and a source", (kind) => {
    const row: ElementRow = elementTable[kind]
    expect(row.low).toBeLessThanOrEqual(row.k)
    expect(row.high).toBeGreaterThanOrEqual(row.k)
    expect(row.label).toMatch(/^[A-Z0-9]/)
    expect(row.source).toBeTruthy()
  })

  test("never lets a flared outflow recover more than half of the speed", () => {
    expect(elementTable.lily_outflow.low).toBeGreaterThanOrEqual(0.7)
  })
})

describe("lossOf", () => {
  test("takes the count times the table's value and range", () => {
    expect(lossOf({ kind: "barb", count: 4 }, 16, 0)).toMatchObject({ k: 3.2, bore_mm: 16 })
    const { low, high } = lossOf({ kind: "quick_release", count: 2 }, 16, 0)
    expect([low, high]).toEqual([4, 12])
  })

  test("takes a measured k as it is, without a range", () => {
    expect(lossOf({ kind: "uv", k: 2.7 }, 16, 0)).toEqual({ k: 2.7, low: 2.7, high: 2.7, bore_mm: 16 })
  })

  test("refers a heater with a bore of its own to that bore, a widening to the narrower one", () => {
    expect(lossOf({ kind: "heater", inner_diameter_mm: 12 }, 16, 0).bore_mm).toBe(12)
    expect(lossOf({ kind: "expansion", inner_diameter_mm: 60 }, 16, 0)).toMatchObject({
      bore_mm: 16,
      k: expansionLoss(16 / 60),
    })
  })

  test("takes a widening into the open, whose other bore is not known, at its full speed head", () => {
    expect(lossOf({ kind: "expansion" }, 16, 0).k).toBe(1)
  })

  test("refuses a barb wider than its hose, and another element without its k, naming the row", () => {
    expect(() => lossOf({ kind: "barb", inner_diameter_mm: 17 }, 16, 3)).toThrow(
      expect.objectContaining({ code: "out_of_domain", field: "elements.3.inner_diameter_mm" }),
    )
    expect(() => lossOf({ kind: "other" }, 16, 1)).toThrow(
      expect.objectContaining({ code: "out_of_domain", field: "elements.1.k" }),
    )
  })
})
