import fc from "fast-check"
import { describe, expect, it } from "vitest"
import { hermite, interpolateCubic, interpolateLinear, monotoneSlopes } from "@/lib/numeric/interpolate"

const decreasing = fc
  .array(fc.tuple(fc.double({ min: 0.1, max: 5, noNaN: true }), fc.double({ min: 0, max: 5, noNaN: true })), {
    minLength: 3,
    maxLength: 8,
  })
  .map((steps) => {
    const x = [0]
    const y = [100]
    for (const [dx, dy] of steps) {
      x.push(x.at(-1)! + dx)
      y.push(y.at(-1)! - dy)
    }
    return { x, y }
  })

describe("interpolateLinear", () => {
  const table = { x: [0, 1, 3], y: [0, 10, 50] }
  it("draws straight lines inside and goes on with the end lines outside", () => {
    expect(interpolateLinear(table, 0.5)).toBe(5)
    expect(interpolateLinear(table, 2)).toBe(30)
    expect(interpolateLinear(table, 4)).toBe(70)
    expect(interpolateLinear(table, -1)).toBe(-10)
  })
})

describe("the monotone cubic", () => {
  it("has the slopes and values of SciPy 1.17.1 PchipInterpolator for a pump curve", () => {
    const table = { x: [0, 300, 700, 900, 1200], y: [2.1, 1.9, 1.2, 0.7, 0] }
    const slopes = monotoneSlopes(table)
    const expected = [
      -0.0002023809523809534, -0.0009453376205787787, -0.0021, -0.0024193548387096775, -0.002233333333333333,
    ]
    slopes.forEach((slope, i) => {
      expect(slope).toBeCloseTo(expected[i]!, 15)
    })
    expect(interpolateCubic(table, slopes, 100)).toBeCloseTo(2.060160941832968, 12)
    expect(interpolateCubic(table, slopes, 500)).toBeCloseTo(1.607733118971061, 12)
    expect(interpolateCubic(table, slopes, 1000)).toBeCloseTo(0.460621266427718, 12)
  })

  it("passes through its points and never turns between them", () => {
    fc.assert(
      fc.property(decreasing, (table) => {
        const slopes = monotoneSlopes(table)
        const last = table.x.at(-1)!
        table.x.forEach((x, i) => {
          expect(interpolateCubic(table, slopes, x)).toBeCloseTo(table.y[i]!, 9)
        })
        let previous = table.y[0]!
        for (let i = 1; i <= 60; i++) {
          const now = interpolateCubic(table, slopes, (last * i) / 60)
          expect(now).toBeLessThanOrEqual(previous + 1e-9)
          previous = now
        }
      }),
    )
  })

  it("is a straight line through two points", () => {
    const table = { x: [0, 2], y: [4, 0] }
    expect(interpolateCubic(table, monotoneSlopes(table), 0.5)).toBeCloseTo(3, 12)
  })

  it("hermite reproduces any cubic exactly", () => {
    fc.assert(
      fc.property(fc.double({ min: 0, max: 1, noNaN: true }), (s) => {
        const y = (x: number) => 2 - 3 * x + x ** 2 - 0.5 * x ** 3
        const slope = (x: number) => -3 + 2 * x - 1.5 * x ** 2
        const [from, h] = [1, 2]
        const value = hermite({ s, h, y0: y(1), y1: y(3), m0: slope(1), m1: slope(3) })
        expect(value).toBeCloseTo(y(from + s * h), 10)
      }),
    )
  })
})
