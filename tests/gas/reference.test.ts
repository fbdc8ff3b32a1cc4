import { describe, expect, test } from "vitest"
import { passes } from "@/scripts/reference/format"
import { gas } from "@/scripts/reference/gas"
import { flowGasPublished } from "@/scripts/reference/published"
import { checkFile } from "@/scripts/reference/read"

const KINDS = [
  "chem",
  "exchange",
  "lead",
  "decay",
  "day_constant",
  "day_hold",
  "controller",
  "saturation",
  "cylinder_pressure",
  "cylinder_life",
  "room_full_release",
  "room_leak",
  "bubble_count",
  "bubble_rise",
  "diffuser_eta",
  "reactor",
]

describe("gas rows by SciPy (tests/reference/gas.csv)", () => {
  const report = checkFile("tests/reference/gas.csv", [gas])

  test("are all compared, every output of every kind", () => {
    expect(report.rows).toBe(48)
    expect(report.problems).toEqual([])
    expect(new Set(report.deviations.map(({ kind }) => kind))).toEqual(new Set(KINDS))
    expect(report.deviations).toHaveLength(199)
  })

  test("agree: closed forms to 1e-6, bubble courses to 0.2 %, chemistry and controller levels to 0.5 %", () => {
    expect(report.deviations.filter((d) => !passes(d))).toEqual([])
    expect(Math.max(...report.deviations.map((d) => d.tolerance))).toBeLessThanOrEqual(0.01)
  })
})

describe("the reader of gas rows", () => {
  const row = { type: "decay", inputs: "k_per_h=0.245;Ceq_mgL=0.6;C0_mgL=28.7;hours=6.1;resp_mgL_h=0.01" }

  test("finds a value that is off", () => {
    expect(gas.check({ ...row, outputs: "C_mgL=7.1" }).some(passes)).toBe(false)
    const state = { type: "cylinder_pressure", inputs: "T_C=43.2;fill_kg_L=0.68", outputs: "state=two-phase" }
    expect(gas.check(state).some(passes)).toBe(false)
  })

  test.each([
    [{ ...row, type: "decai", outputs: "C_mgL=7" }, "unknown kind"],
    [{ ...row, outputs: "C=7" }, "no quantity"],
    [{ ...row, outputs: "C_mgL=seven" }, "not a number"],
    [{ ...row, inputs: "k_per_h=0.245", outputs: "C_mgL=7" }, "is missing"],
    [{ ...row, inputs: "k_per_h", outputs: "C_mgL=7" }, "not a list"],
  ])("refuses what it cannot compare: %o", (bad, words) => {
    expect(() => gas.check(bad)).toThrow(words)
  })
})

describe("published numbers of flow and gas (tests/reference/flow-gas-published.csv)", () => {
  const report = checkFile("tests/reference/flow-gas-published.csv", [flowGasPublished])

  test("are all compared", () => {
    expect(report.rows).toBe(32)
    expect(report.problems).toEqual([])
    expect(report.deviations.filter(({ kind }) => kind === "published")).toHaveLength(35)
  })

  test("agree within each row's own tolerance, and with the specification's formulas to the printed digits", () => {
    expect(report.deviations.filter((d) => !passes(d))).toEqual([])
  })
})
