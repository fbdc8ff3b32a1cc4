import { describe, expect, test } from "vitest"
import { bubbleTravel } from "@/lib/flow/bubble-travel"
import {
  boreVelocity,
  contactVolume,
  flowAtVelocity,
  gasCap,
  outletCo2,
  saturation,
} from "@/lib/flow/reactor"
import { reactorWater } from "@/lib/flow/reactor-input"
import { createShrinkRate, dissolve } from "@/lib/gas/bubble-dissolution"
import { bubbleRise } from "@/lib/gas/bubble-rise"
import { STANDARD_ATMOSPHERE_PA } from "@/lib/gas/carbon-dioxide"

/** Rows GP46 to GP48 of the gas reference (SciPy ODE, 25 °C, feed bubble 3 mm). */
const rows = [
  {
    body_mm: 90,
    flow_l_h: 786,
    nozzle_mm: 12,
    feed: 68.2,
    gauge_bar: 0.11,
    inlet: 12.4,
    v_body: 0.034319831,
    v_nozzle: 1.9304905,
    start_mm: 0.32244543,
    time_s: 1.6549697,
    length_m: 0.029292939,
    fresh: 61.138723,
    aged: 5.6628142,
    outlet: 17.606107,
    saturation: 1614.1333,
  },
  {
    body_mm: 90,
    flow_l_h: 741,
    nozzle_mm: 16,
    feed: 115.2,
    gauge_bar: 0.21,
    inlet: 15.5,
    v_body: 0.032354956,
    v_nozzle: 1.023731,
    start_mm: 0.30806679,
    time_s: 1.5661718,
    length_m: 0.026126197,
    fresh: 66.664773,
    aged: 11.188864,
    outlet: 24.827935,
    saturation: 1762.0067,
  },
  {
    body_mm: 90,
    flow_l_h: 1135,
    nozzle_mm: 16,
    feed: 58.8,
    gauge_bar: 0.08,
    inlet: 14.6,
    v_body: 0.049558535,
    v_nozzle: 1.568063,
    start_mm: 0.43626684,
    time_s: 2.3605733,
    length_m: 0.059935068,
    fresh: 59.361435,
    aged: 3.8855261,
    outlet: 17.70837,
    saturation: 1569.7713,
  },
]

function within(actual: number, expected: number, share: number) {
  expect(Math.abs(actual / expected - 1), `${actual} against ${expected}`).toBeLessThan(share)
}

describe("the reactor rows of the gas reference", () => {
  test.each(rows)("body $body_mm mm at $flow_l_h L/h", (row) => {
    const into = reactorWater(25, STANDARD_ATMOSPHERE_PA / 1e5 + row.gauge_bar, row.inlet)
    const course = bubbleTravel(3, into).carryOver(row.v_body)
    within(boreVelocity(row.flow_l_h, row.body_mm), row.v_body, 1e-6)
    within(boreVelocity(row.flow_l_h, row.nozzle_mm), row.v_nozzle, 1e-6)
    within(outletCo2(row.inlet, row.feed, row.flow_l_h), row.outlet, 1e-6)
    within(course.start_diameter_mm, row.start_mm, 1e-6)
    // Our Henry's constant is per litre of water, the rows' per kilogram: 0.3 %.
    within(course.time_s, row.time_s, 0.005)
    within(course.length_m, row.length_m, 0.005)
    within(saturation(into), row.saturation, 0.005)
    within(gasCap(row.body_mm, into).fresh_mg_min, row.fresh, 0.005)
    within(gasCap(row.body_mm, into).aged_mg_min, row.aged, 0.005)
  })
})

describe("bubbleTravel", () => {
  const into = reactorWater(25, 1.135, 20)
  const travel = bubbleTravel(3, into)

  /** The design's table of carry-over, 25 °C, 1.12 to 1.15 bar. */
  test.each([
    [0.04, 0.36, 0.04],
    [0.06, 0.52, 0.09],
    [0.08, 0.68, 0.15],
    [0.1, 0.85, 0.24],
    [0.12, 1.03, 0.35],
    [0.15, 1.29, 0.56],
    [0.18, 1.66, 0.83],
    [0.2, 1.95, 1.05],
    [0.24, 2.63, 1.64],
    [0.28, 3, 2.4],
  ])("at %d m/s sweeps bubbles of %d mm and asks for %d m", (velocity, diameter_mm, length_m) => {
    const course = travel.carryOver(velocity)
    expect(course.start_diameter_mm).toBeCloseTo(diameter_mm, 2)
    expect(Math.abs(course.length_m - length_m)).toBeLessThan(length_m > 2 ? 0.05 : 0.01)
  })

  test("agrees with the dissolution of a single bubble (another quadrature) within 1e-4", () => {
    for (const velocity of [0.03, 0.08, 0.2, 0.3]) {
      const { start_diameter_mm, time_s, length_m } = travel.carryOver(velocity)
      const alone = dissolve(start_diameter_mm, into)!
      within(time_s, alone.time_s, 5e-4)
      within(length_m, velocity * alone.time_s - alone.rise_m, 2e-3)
    }
  })

  test("finds the greatest velocity whose carry-over is the length, over the whole range", () => {
    for (const length_m of [0.02, 0.1, 0.3, 0.8, 2, 4]) {
      within(travel.carryOver(travel.greatestVelocity(length_m)).length_m, length_m, 1e-6)
    }
  })

  test("lets no gas escape from a body as long as the carry-over, and some from a shorter one", () => {
    const { length_m } = travel.carryOver(0.18)
    expect(travel.escapedFraction(0.18, length_m * 1.0001)).toBe(0)
    const shorter = [0.9, 0.6, 0.3, 0.05].map((share) => travel.escapedFraction(0.18, length_m * share))
    expect(shorter.every((fraction, i) => i === 0 || fraction > shorter[i - 1]!)).toBe(true)
    expect(shorter[3]).toBeLessThan(1)
  })

  /** Explicit Euler steps of the differential equation, as an independent check of the escaped share. */
  test("leaves the bubble that a step-by-step simulation leaves", () => {
    const rate = createShrinkRate(into)
    let diameter_mm = 3
    let travelled_m = 0
    for (const dt = 1e-4; travelled_m < 0.5; ) {
      travelled_m += (0.3 - bubbleRise(diameter_mm, into.water)) * dt
      diameter_mm -= rate(diameter_mm) * dt
    }
    within(travel.escapedFraction(0.3, 0.5), (diameter_mm / 3) ** 3, 5e-3)
  })

  test("refuses water that holds more CO2 than it can dissolve", () => {
    expect(() => bubbleTravel(3, reactorWater(25, 1.12, 1e5))).toThrow(
      expect.objectContaining({ code: "out_of_domain", field: "inlet_co2_mg_l" }),
    )
  })
})

/** The design's tables of flow at a velocity. */
test.each([
  [40, 0.1, 452],
  [50, 0.1, 707],
  [60, 0.15, 1527],
  [75, 0.15, 2386],
  [90, 0.1, 2290],
  [110, 0.15, 5132],
  [9, 0.8, 183],
  [9.6, 1, 261],
  [12.8, 0.8, 371],
  [12.8, 1, 463],
  [16, 1, 724],
])("a bore of %d mm carries %d m/s at %d L/h", (diameter_mm, velocity, flow_l_h) => {
  expect(Math.round(flowAtVelocity(velocity, diameter_mm))).toBe(flow_l_h)
})

/** The design's contact volumes: 0.09, 0.35 and 0.88 L. */
test("asks for 0.35 L of bubbly water to dissolve 60 mg/min", () => {
  expect(contactVolume(15)).toBeCloseTo(0.09, 2)
  expect(contactVolume(60)).toBeCloseTo(0.35, 2)
  expect(contactVolume(150)).toBeCloseTo(0.88, 2)
})

test("an aged gas cap dissolves seven to ten times less than a fresh one", () => {
  const { fresh_mg_min, aged_mg_min } = gasCap(60, reactorWater(25, 1.133, 10))
  expect(fresh_mg_min / aged_mg_min).toBeGreaterThan(7)
  expect(fresh_mg_min / aged_mg_min).toBeLessThan(10.5)
})
