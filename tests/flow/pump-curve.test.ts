import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { advertisedCurve, atSpeed, M3_S_PER_L_H, type PumpCurve, tabulatedCurve } from "@/lib/flow/pump-curve"

const headAt = (curve: PumpCurve, flow_l_h: number) => curve.headAt(flow_l_h * M3_S_PER_L_H)

describe("advertisedCurve", () => {
  test("passes through both advertised numbers whatever its shape", () => {
    for (const exponent of [1, 1.5, 2]) {
      const curve = advertisedCurve({ max_flow_l_h: 1000, max_head_m: 1.6 }, exponent)
      expect(headAt(curve, 0)).toBe(1.6)
      expect(headAt(curve, 1000)).toBeCloseTo(0, 12)
    }
  })

  test("with n = 2 is EPANET's curve from one point: shut-off head 4/3 of the design head at half the flow", () => {
    const curve = advertisedCurve({ max_flow_l_h: 1000, max_head_m: 4 / 3 }, 2)
    expect(headAt(curve, 500)).toBeCloseTo(1, 12)
  })
})

describe("tabulatedCurve", () => {
  test("passes through falling points and stays monotone between them", () => {
    const heads = fc.array(fc.double({ min: 0.01, max: 1, noNaN: true }), { minLength: 2, maxLength: 8 })
    fc.assert(
      fc.property(heads, (steps) => {
        const total = steps.reduce((sum, step) => sum + step, 0)
        let head_m = total
        const points = [0, ...steps].map((step, i) => {
          head_m -= step
          return { flow_l_h: 100 * i, head_m: Math.max(0, head_m) }
        })
        const curve = tabulatedCurve(points)
        for (const point of points) expect(headAt(curve, point.flow_l_h)).toBeCloseTo(point.head_m, 9)
        let last = Number.POSITIVE_INFINITY
        for (let flow = 0; flow <= 100 * steps.length; flow += 7) {
          const head = headAt(curve, flow)
          expect(head).toBeLessThanOrEqual(last + 1e-12)
          last = head
        }
      }),
    )
  })

  test("does not mind the order of the points", () => {
    const points = [
      { flow_l_h: 600, head_m: 0.9 },
      { flow_l_h: 0, head_m: 1.6 },
      { flow_l_h: 1000, head_m: 0 },
      { flow_l_h: 300, head_m: 1.4 },
    ]
    const sorted = [...points].sort((a, b) => a.flow_l_h - b.flow_l_h)
    expect(headAt(tabulatedCurve(points), 450)).toBe(headAt(tabulatedCurve(sorted), 450))
  })

  /** Pooling by hand: 1.3 and 1.5 rise, so both become 1.4. */
  test("pools neighbours that rise into their mean", () => {
    const curve = tabulatedCurve([
      { flow_l_h: 0, head_m: 1.6 },
      { flow_l_h: 200, head_m: 1.3 },
      { flow_l_h: 400, head_m: 1.5 },
      { flow_l_h: 800, head_m: 0.4 },
    ])
    expect(headAt(curve, 200)).toBeCloseTo(1.4, 12)
    expect(headAt(curve, 300)).toBeCloseTo(1.4, 12)
  })

  test("holds the head below the first point and goes on falling in a line beyond the last", () => {
    const curve = tabulatedCurve([
      { flow_l_h: 200, head_m: 1.2 },
      { flow_l_h: 400, head_m: 0.8 },
    ])
    expect(headAt(curve, 50)).toBe(1.2)
    expect(curve.maxFlow_m3_s / M3_S_PER_L_H).toBeCloseTo(800, 9)
    expect(headAt(curve, 600)).toBeCloseTo(0.4, 12)
  })

  /** Least squares by hand: heads 1.0, 1.2, 0.2 at 0, 1, 2: over Q the line 1.2 − 0.4 Q, error 0.48; over Q² the
   * line 1.2 − 0.24 Q² (error 0.197…), which is nearer. */
  test("fits three points that do not fall by the nearest falling parabola", () => {
    const curve = tabulatedCurve([
      { flow_l_h: 0, head_m: 1 },
      { flow_l_h: 1, head_m: 1.2 },
      { flow_l_h: 2, head_m: 0.2 },
    ])
    expect(headAt(curve, 0)).toBeCloseTo(1.2, 1)
    const squares = (curve.shutOff_m - headAt(curve, 2)) / (curve.shutOff_m - headAt(curve, 1))
    expect(squares).toBeCloseTo(4, 9)
    const error = [1, 1.2, 0.2].reduce((sum, head, flow) => sum + (headAt(curve, flow) - head) ** 2, 0)
    expect(error).toBeLessThan(0.48)
  })

  test("averages two readings at the same flow", () => {
    const curve = tabulatedCurve([
      { flow_l_h: 0, head_m: 1.5 },
      { flow_l_h: 0, head_m: 1.7 },
      { flow_l_h: 500, head_m: 0 },
    ])
    expect(curve.shutOff_m).toBeCloseTo(1.6, 12)
  })

  test("refuses one point and heads that never fall, saying what to do", () => {
    const rising = [0, 1, 2].map((i) => ({ flow_l_h: 100 * i, head_m: 1 + i }))
    for (const points of [rising.slice(0, 1), rising, rising.slice(0, 2)]) {
      expect(() => tabulatedCurve(points)).toThrow(
        expect.objectContaining({ code: "out_of_domain", field: "pump.points" }),
      )
    }
  })
})

test("atSpeed follows the affinity laws: at 60 % speed 60 % of the flow and 36 % of the head", () => {
  const slow = atSpeed(advertisedCurve({ max_flow_l_h: 1000, max_head_m: 2 }, 1.5), 0.6)
  expect(slow.shutOff_m).toBeCloseTo(0.72, 12)
  expect(slow.maxFlow_m3_s / M3_S_PER_L_H).toBeCloseTo(600, 9)
  const full = advertisedCurve({ max_flow_l_h: 1000, max_head_m: 2 }, 1.5)
  expect(headAt(slow, 300)).toBeCloseTo(0.36 * headAt(full, 500), 12)
})
