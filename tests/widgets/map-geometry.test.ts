import { describe, expect, it } from "vitest"
import { co2Bands } from "@/lib/chemistry/level"
import { areas, doubtOf, lineOf, phOf, placeOnMap } from "@/widgets/co2-level/map-geometry"

describe("the map of pH and KH", () => {
  it("puts a water where its lines of equal CO2 say", () => {
    const water = { co2_mg_l: 20, kh_dkh: 4, temperature_c: 25 }
    const place = placeOnMap({ ph: phOf(water), kh_dkh: 4 })
    const [before, after] = between(lineOf(20, 25), place.y)
    const share = (place.y - before.y) / (after.y - before.y)
    expect(before.x + share * (after.x - before.x)).toBeCloseTo(place.x, 3)
  })

  // CHEMISTRY 6: sodium bicarbonate water of 4 dKH holds 30 mg/L at pH 6.722 (15 °C) and 6.630 (30 °C). With the
  // salts that KH alone lets us guess the set-point is up to 0.018 lower.
  it("moves with the temperature as the method says", () => {
    expect(phOf({ co2_mg_l: 30, kh_dkh: 4, temperature_c: 15 })).toBeCloseTo(6.713, 1)
    const [cold, warm] = [15, 30].map((temperature_c) => phOf({ co2_mg_l: 30, kh_dkh: 4, temperature_c }))
    expect(cold! - warm!).toBeCloseTo(6.722 - 6.63, 2)
  })

  it("has an area for each level, without a gap between two", () => {
    const drawn = areas(25)
    expect(drawn.map(({ level }) => level)).toEqual(["low", "in_range", "high", "dangerous"])
    for (const [index, { level, outline }] of drawn.entries()) {
      const upTo = co2Bands.findLast((band) => band.level === level)!.up_to_mg_l
      if (!Number.isFinite(upTo)) continue
      const edge = lineOf(upTo, 25)
      expect(outline).toEqual(expect.arrayContaining(edge))
      expect(drawn[index + 1]!.outline).toEqual(expect.arrayContaining(edge))
    }
  })

  it("draws the doubt of a reading as far as its standard errors reach, and never below no KH", () => {
    const water = { ph: 7, kh_dkh: 4 }
    const outline = doubtOf(water, { ph_error: 0.1, kh_error_dkh: 0.5 })
    const right = placeOnMap({ ph: 7 + 1.96 * 0.1, kh_dkh: 4 })
    expect(Math.max(...outline.map(({ x }) => x))).toBeCloseTo(right.x, 6)
    const low = doubtOf({ ph: 7, kh_dkh: 0.3 }, { ph_error: 0.1, kh_error_dkh: 0.5 })
    expect(low.every(({ x, y }) => Number.isFinite(x) && Number.isFinite(y))).toBe(true)
  })
})

function between(line: { x: number; y: number }[], y: number) {
  const index = line.findIndex((place) => place.y <= y)
  return [line[index - 1]!, line[index]!] as const
}
