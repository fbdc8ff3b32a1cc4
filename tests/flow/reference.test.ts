import { describe, expect, test } from "vitest"
import { flow } from "@/scripts/reference/flow"
import { passes } from "@/scripts/reference/format"
import { checkFile } from "@/scripts/reference/read"

const report = checkFile("tests/reference/flow.csv", [flow])

describe("loops solved by SciPy and EPANET (tests/reference/flow.csv)", () => {
  test("are all compared", () => {
    expect(report.rows).toBe(40)
    expect(report.problems).toEqual([])
    expect(report.deviations.filter(({ quantity }) => quantity === "cb_Q_Lh")).toHaveLength(40)
    expect(report.deviations.filter(({ quantity }) => quantity === "epanet_Q_Lh")).toHaveLength(40)
  })

  test("agree: flow within 1e-6 of SciPy and 0.6 % of EPANET, every hose's loss to the printed digits", () => {
    expect(report.deviations.filter((d) => !passes(d))).toEqual([])
  })
})
