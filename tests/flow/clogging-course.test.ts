import { describe, expect, test } from "vitest"
import { type CloggingInput, cloggingCourse } from "@/lib/flow/clogging-course"
import { clogFactor, cloggingOf, DUE_CLOGGING } from "@/lib/flow/media"
import { reactorVerdict } from "@/lib/flow/reactor-verdict"
import { workedLoop } from "./loops"

const usual: CloggingInput = {
  ...workedLoop(180, 16, 1000, 1.6),
  reactor: { body_diameter_mm: 60, body_length_mm: 350 },
  feed_mg_min: 63.7,
  inlet_co2_mg_l: 30,
  steps: 11,
}

test("the scale of clogging: clean, loaded, due for cleaning and blocked media cost 1, 2, 5 and 10 times", () => {
  expect(clogFactor(0)).toBe(1)
  expect(clogFactor(0.3)).toBeCloseTo(2, 2)
  expect(clogFactor(DUE_CLOGGING)).toBeCloseTo(5, 12)
  expect(clogFactor(1)).toBe(10)
  expect(cloggingOf(clogFactor(0.42))).toBeCloseTo(0.42, 12)
})

describe("cloggingCourse", () => {
  test("falls from 568 L/h clean to 289 L/h blocked in the worked 180 L loop, never rising on the way", () => {
    const { series } = cloggingCourse(usual).result
    expect(series).toHaveLength(11)
    expect(series[0]?.flow_l_h).toBeCloseTo(567.65, 1)
    expect(series[10]?.clogging).toBe(1)
    for (const [i, step] of series.entries()) {
      if (i > 0) expect(step.flow_l_h).toBeLessThan(series[i - 1]!.flow_l_h)
    }
  })

  /** The design: flow falls 22 to 35 % after months without cleaning. */
  test("loses 22 to 35 % of the flow by the time that cleaning is due", () => {
    for (const loop of [
      workedLoop(60, 12, 400, 0.7),
      workedLoop(180, 16, 1000, 1.6),
      workedLoop(450, 16, 1850, 2.1),
    ]) {
      const { result } = reactorVerdict({ ...usual, ...loop })
      const loss = 1 - result.when_due.flow_l_h / result.flow_l_h
      expect(loss).toBeGreaterThan(0.22)
      expect(loss).toBeLessThan(0.35)
    }
  })

  test("puts the limit where the flow gives the jet 0.8 m/s, and the verdict turns there", () => {
    const { result } = cloggingCourse(usual)
    expect(result.limit).toBe("reached")
    const at = (clogging: number) => reactorVerdict({ ...usual, clogging }).result
    const limit = at(result.limit_clogging!)
    expect(limit.flow_l_h).toBeCloseTo(result.limit_flow_l_h, 6)
    expect(limit.nozzle_velocity_m_s).toBeCloseTo(0.8, 9)
    expect(at(result.limit_clogging! - 0.01).verdict).not.toBe("unsuitable")
    expect(at(result.limit_clogging! + 0.01).verdict).toBe("unsuitable")
  })

  test("gives the limit for every shape of an advertised curve, and one limit for a measured curve", () => {
    const { result, uncertainty } = cloggingCourse(usual)
    expect(uncertainty.limit_clogging_low).toBeLessThan(result.limit_clogging!)
    expect(uncertainty.limit_clogging_high).toBeGreaterThan(result.limit_clogging!)
    const points = [0, 400, 700, 1000].map((flow_l_h) => ({
      flow_l_h,
      head_m: 1.6 * (1 - (flow_l_h / 1000) ** 1.5),
    }))
    const measured = cloggingCourse({ ...usual, pump: { points } })
    expect(measured.uncertainty.limit_clogging_low).toBe(measured.result.limit_clogging)
    expect(measured.uncertainty.limit_clogging_high).toBe(measured.result.limit_clogging)
  })

  test("says that a weak filter locks already when clean, and a strong one not even when blocked", () => {
    const weak = cloggingCourse({ ...usual, ...workedLoop(180, 16, 500, 0.8) }).result
    expect([weak.limit, weak.limit_clogging]).toEqual(["already", 0])
    const strong = cloggingCourse({ ...usual, ...workedLoop(180, 16, 3000, 3) }).result
    expect([strong.limit, strong.limit_clogging]).toEqual(["beyond", null])
  })

  test("knows no limit when the gas cap alone dissolves the feed", () => {
    const { limit, limit_clogging } = cloggingCourse({ ...usual, feed_mg_min: 0.5 }).result
    expect([limit, limit_clogging]).toEqual(["never", null])
  })

  test.each([1, 2.5, 102])("refuses %d steps", (steps) => {
    expect(() => cloggingCourse({ ...usual, steps })).toThrow(expect.objectContaining({ field: "steps" }))
  })

  test("says so when the media's loss is hidden in the pump's numbers", () => {
    const { cautions } = cloggingCourse({ ...usual, clean_media_fraction: 1 })
    expect(cautions.map(({ code }) => code)).toContain("clogging_not_modelled")
  })
})
