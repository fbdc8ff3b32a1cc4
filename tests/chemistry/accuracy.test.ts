import { readFileSync } from "node:fs"
import { join } from "node:path"
import { describe, expect, it } from "vitest"
import { carbonate, carbonatePublished } from "@/scripts/reference/carbonate"
import { checkFile } from "@/scripts/reference/read"

const folder = join(import.meta.dirname, "../reference")

/**
 * How far the engine may be from PHREEQC 3 (carbonate.csv), each with the reason for what is left. Relative, but for
 * the two in pH. The tolerances of single rows are in scripts/reference/carbonate.ts and come from the same list.
 */
const accuracy = {
  // The sodium bicarbonate ion pair, which the model leaves out, above 20 dKH; the median is 0.04 %.
  "forward_nahco3 co2_mg_l": 0.007,
  "forward_nahco3 hco3_mmol_l": 0.007,
  "forward_nahco3 co3_mmol_l": 0.007,
  "forward_nahco3 pco2_uatm": 0.007,
  "forward_nahco3 dic_mmol_l": 0.003,
  // The guess takes calcium water with other salts, PHREEQC was given sodium water with none.
  "forward_nahco3 co2_mg_l, ionic strength from KH": 0.05,
  "forward_nahco3 co2_mg_l, ionic strength from conductivity": 0.025,
  "forward_phosphate co2_mg_l": 0.003,
  // Calcium and magnesium pairs are left out: 2.5 % to pH 7.8, 4 % above.
  "forward_hard co2_mg_l": 0.04,
  "forward_hard pco2_uatm": 0.04,
  "forward_hard co2_mg_l, ionic strength from GH": 0.06,
  "forward_hard co2_mg_l, ionic strength from conductivity": 0.03,
  "inverse_ph ph": 0.003,
  "degassed_ph ph": 0.003,
} as const

describe("accuracy against PHREEQC", () => {
  const report = checkFile(join(folder, "carbonate.csv"), [carbonate])

  it("checks all 120 rows and drops none", () => {
    const text = readFileSync(join(folder, "carbonate.csv"), "utf8")
    expect(report.rows).toBe(text.split("\n").filter((line) => /^P\d+,/.test(line)).length)
    expect(report.rows).toBe(120)
    expect(report.problems).toEqual([])
    // 70 soft rows give 7 comparisons, 19 hard rows 4 and the alkaline one 2, 6 with phosphate and 24 inverse give 1.
    expect(report.deviations.length).toBe(70 * 7 + 19 * 4 + 2 + 6 + 24)
  })

  it("compares no quantity that is not in the table", () => {
    const found = new Set(report.deviations.map((d) => `${d.kind} ${d.quantity}`))
    expect([...found].sort()).toEqual(Object.keys(accuracy).sort())
  })

  it.each(Object.entries(accuracy))("%s within %d", (name, limit) => {
    const rows = report.deviations.filter((d) => `${d.kind} ${d.quantity}` === name)
    expect(rows.length).toBeGreaterThan(0)
    for (const row of rows) {
      expect(row.deviation).toBeLessThanOrEqual(row.tolerance)
      expect(row.deviation).toBeLessThanOrEqual(limit)
    }
  })
})

describe("accuracy against published values", () => {
  const report = checkFile(join(folder, "carbonate-published.csv"), [carbonatePublished])

  it("checks all 66 rows and drops none", () => {
    expect(report.rows).toBe(66)
    expect(report.problems).toEqual([])
    expect(report.deviations.length).toBe(66)
  })

  it("is within each row's own tolerance", () => {
    for (const row of report.deviations) {
      expect(row.deviation, `${row.quantity} ${row.expected}`).toBeLessThanOrEqual(row.tolerance)
    }
  })
})
