import { describe, expect, it } from "vitest"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { type Co2GridInput, co2Grid } from "@/lib/chemistry/co2-grid"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const field: Co2GridInput = {
  ...carbonateDefaults,
  ph_from: 6,
  ph_to: 7.6,
  ph_step: 0.1,
  kh_from_dkh: 1,
  kh_to_dkh: 10,
  kh_step_dkh: 1,
}

describe("the grid", () => {
  const { result } = co2Grid(field)

  it("covers both ends: 17 pH by 10 KH, without the dust of repeated addition", () => {
    expect(result.rows.map((row) => row.kh_dkh)).toEqual([1, 2, 3, 4, 5, 6, 7, 8, 9, 10])
    const phs = result.rows[0]!.cells.map((cell) => cell.ph)
    expect(phs).toEqual([6, 6.1, 6.2, 6.3, 6.4, 6.5, 6.6, 6.7, 6.8, 6.9, 7, 7.1, 7.2, 7.3, 7.4, 7.5, 7.6])
  })

  it("says in each cell what the single question says", () => {
    for (const { kh_dkh, cells } of result.rows) {
      for (const { ph, co2_mg_l, level } of cells) {
        const single = co2FromPh({ ...carbonateDefaults, ph, kh_dkh }).result
        expect(co2_mg_l).toBe(single.co2_mg_l)
        expect(level).toBe(single.level)
      }
    }
  })

  it("ends at the last step that fits", () => {
    const rows = co2Grid({ ...field, kh_from_dkh: 1, kh_to_dkh: 4.9, kh_step_dkh: 2 }).result.rows
    expect(rows.map((row) => row.kh_dkh)).toEqual([1, 3])
  })

  it("takes 2,500 cells and refuses 2,501", () => {
    const cells = { ph_from: 6, ph_to: 6.49, ph_step: 0.01, kh_from_dkh: 1, kh_step_dkh: 0.1 }
    expect(co2Grid({ ...field, ...cells, kh_to_dkh: 5.9 }).result.rows.length).toBe(50)
    expect(() => co2Grid({ ...field, ...cells, kh_to_dkh: 6 })).toThrow(/ph_step: 50 × 51 cells/)
  })

  it.each([
    ["ph_to", { ph_from: 7, ph_to: 6 }],
    ["kh_to_dkh", { kh_from_dkh: 7, kh_to_dkh: 6 }],
    ["ph_step", { ph_step: 0 }],
    ["ph_from", { ph_from: 4 }],
    ["kh_from_dkh", { ph_to: 9.5, kh_from_dkh: 0.2, temperature_c: 50 }],
  ])("refuses and names %s for %o", (name, change) => {
    try {
      co2Grid({ ...field, ...change })
      expect.unreachable()
    } catch (error) {
      expect(error).toBeInstanceOf(OutOfDomain)
      expect((error as OutOfDomain).field).toBe(name)
    }
  })
})
