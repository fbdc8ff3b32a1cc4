import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { carbonateSystem, co2AtPressure } from "@/lib/chemistry/carbonate"
import { waterVapourPressureAtm } from "@/lib/chemistry/water"
import {
  bubbleVolume,
  counterGasDensity,
  counterWater,
  milligramsPerMillilitre,
  tateVolume,
} from "@/lib/gas/bubble-count"
import { createShrinkRate, dissolve, risingBubbleEfficiency } from "@/lib/gas/bubble-dissolution"
import { bubbleRate } from "@/lib/gas/bubble-rate"
import { bubbleMassTransfer, bubbleRise, bubbleWater, cleanBubbleRise } from "@/lib/gas/bubble-rise"
import { gasDefaults } from "@/lib/gas/defaults"

const water = bubbleWater(25)
const into = {
  water,
  co2_mg_l: 15,
  henry_mg_l_atm: co2AtPressure(carbonateSystem({ temperature_c: 25, ionic_strength_mol_l: 0 }), 1),
  vapour_pressure_atm: waterVapourPressureAtm(25),
}
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })

/** The specification's table at 25 °C: mm, rise, clean rise, k_L in 1e-5 m/s, seconds to dissolve near 1.12 bar. */
const table = [
  [0.2, 0.0176, null, 10.1, 1.1],
  [0.3, 0.0313, null, 10.1, 1.7],
  [0.5, 0.0578, null, 10.1, 2.9],
  [0.7, 0.0823, null, 10.0, 4.2],
  [1.0, 0.116, null, 9.7, 6.1],
  [1.3, 0.151, 0.343, 9.7, 8.0],
  [1.5, 0.168, 0.322, 9.4, 9.3],
  [2.0, 0.203, 0.286, 8.9, 12.7],
  [2.5, 0.233, 0.265, 8.5, 16.3],
  [3.0, 0.25, 0.251, 8.1, 20],
  [5.0, 0.239, 0.231, 6.1, 38],
] as const

describe("a bubble", () => {
  test.each(table)(
    "of %d mm rises and dissolves as the specification's table says",
    (mm, rise, clean, k, s) => {
      expect(Math.abs(bubbleRise(mm, water) / rise - 1)).toBeLessThan(0.005)
      if (clean) expect(Math.abs(cleanBubbleRise(mm, water) / clean - 1)).toBeLessThan(0.003)
      expect(Math.abs((1e5 * bubbleMassTransfer(mm, water)) / k - 1)).toBeLessThan(0.007)
      const { time_s } = dissolve(mm, { ...into, pressure_pa: 1.13e5 })!
      // The table also counts the last 0.05 mm, which take a quarter of a second at most.
      expect(s - time_s).toBeGreaterThan(-0.06 * s)
      expect(s - time_s).toBeLessThan(0.06 * s + 0.25)
    },
  )

  test("shrinks by 0.15 to 0.17 mm a second, the rule of thumb, from 0.5 to 2 mm", () => {
    const rate = createShrinkRate({ ...into, pressure_pa: 1.12e5 })
    for (const mm of [0.5, 1, 1.5, 2]) {
      expect(rate(mm)).toBeGreaterThan(0.14)
      expect(rate(mm)).toBeLessThan(0.18)
    }
  })

  // Clift's two branches of J meet with a step of 0.01 % near 2.75 mm.
  test("has a rise that is continuous and, up to 3 mm, grows with its size", () => {
    fc.assert(
      fc.property(between(0.05, 2.9), between(5, 40), (mm, t) => {
        const at = bubbleWater(t)
        expect(bubbleRise(mm * 1.001, at)).toBeGreaterThan(bubbleRise(mm, at) * 0.9998)
        expect(bubbleRise(mm * 1.001, at)).toBeLessThan(bubbleRise(mm, at) * 1.01)
      }),
    )
  })

  test("balances buoyancy and drag below 1 mm (Schiller and Naumann)", () => {
    fc.assert(
      fc.property(between(0.05, 1), between(5, 40), (mm, t) => {
        const at = bubbleWater(t)
        const d = mm / 1000
        const u = bubbleRise(mm, at)
        const re = (u * d * at.density_kg_m3) / at.viscosity_pa_s
        const drag = 3 * Math.PI * at.viscosity_pa_s * d * u * (1 + 0.15 * re ** 0.687)
        const buoyancy = ((at.density_kg_m3 - 1.8) * 9.80665 * Math.PI * d ** 3) / 6
        expect(drag / buoyancy).toBeCloseTo(1, 10)
      }),
    )
  })

  test("does not dissolve in water that is already full", () => {
    expect(dissolve(1, { ...into, pressure_pa: 1.1e5, co2_mg_l: 2500 })).toBeNull()
    expect(
      risingBubbleEfficiency({
        bubble_diameter_mm: 1,
        depth_m: 0.4,
        plume_m_s: 0,
        into: { ...into, co2_mg_l: 2500 },
      }),
    ).toBe(0)
  })
})

describe("the efficiency of a diffuser", () => {
  const eta = (bubble_diameter_mm: number, plume_m_s: number, depth_m = 0.4) =>
    risingBubbleEfficiency({ bubble_diameter_mm, depth_m, plume_m_s, into })

  /** The specification's numbers for 0.4 m of water. */
  test.each([
    [0.1, 0.5, 1.0],
    [0.1, 0.8, 0.85],
    [0.1, 1.0, 0.68],
    [0.1, 1.5, 0.4],
    [0.1, 2.0, 0.26],
    [0.2, 0.5, 0.9],
    [0.2, 0.8, 0.63],
    [0.2, 1.0, 0.5],
    [0.2, 1.5, 0.3],
    [0.2, 2.0, 0.2],
  ])("in a plume of %d m/s, bubbles of %d mm: %d", (plume, mm, expected) => {
    expect(Math.abs(eta(mm, plume) - expected)).toBeLessThan(0.006)
  })

  test("grows with depth, falls with bubble size and plume", () => {
    fc.assert(
      fc.property(between(0.3, 4), between(0, 0.3), between(0.05, 1.5), (mm, plume, depth) => {
        const here = eta(mm, plume, depth)
        expect(here).toBeGreaterThan(0)
        expect(here).toBeLessThanOrEqual(1)
        expect(eta(mm, plume, depth * 1.1)).toBeGreaterThanOrEqual(here)
        expect(eta(mm * 1.1, plume, depth)).toBeLessThanOrEqual(here)
        expect(eta(mm, plume + 0.02, depth)).toBeLessThanOrEqual(here)
      }),
    )
  })
})

describe("counting bubbles", () => {
  test("from 2.5 mm at 25 °C: Tate 57.8 µL, off the tube 40.5 µL", () => {
    expect(tateVolume(2.5, counterWater(25))).toBeCloseTo(57.8, 1)
    expect(bubbleVolume(2.5, counterWater(25))).toBeCloseTo(40.5, 1)
  })

  /** The specification's own numerical Young-Laplace maximum: radius, µL and how near the correlation comes. */
  test.each([
    [1.0, 34.4, 0.1],
    [1.25, 43.6, 0.1],
    [2.0, 72.8, 0.21],
  ])("from a radius of %d mm within its error of the Young-Laplace maximum", (radius, volume, error) => {
    expect(Math.abs(bubbleVolume(2 * radius, counterWater(25)) / volume - 1)).toBeLessThan(error)
  })

  test.each([
    [0.1, 0.08],
    [1, 0.146],
    [2, 0.22],
    [2.5, 0.257],
  ])("at %d bar a bubble from 2.5 mm holds %d mg", (counter_pressure_bar, mg) => {
    const density = counterGasDensity({ counter_pressure_bar, temperature_c: 25 })
    expect(bubbleVolume(2.5, counterWater(25)) * density).toBeCloseTo(mg, 3)
  })

  test("1 mL/min is 1.808 mg/min at 1 atm and 25 °C", () => {
    expect(milligramsPerMillilitre(25)).toBeCloseTo(1.808, 3)
  })

  test("oil and glycol make smaller bubbles", () => {
    const glycol = { surface_tension_n_m: 0.045, density_kg_m3: 1110 }
    expect(bubbleVolume(2.5, glycol)).toBeLessThan(0.75 * bubbleVolume(2.5, counterWater(25)))
  })
})

describe("bubbleRate", () => {
  const base = { ...gasDefaults, counter_pressure_bar: 0.15 }

  test("the ramp feed of the default tank, 63.7 mg/min, is about 13 bubbles a second at a reactor: a stream", () => {
    const answer = bubbleRate({ ...base, feed_mg_min: 63.7 })
    expect(answer.result.bubbles_per_s).toBeCloseTo(12.6, 1)
    expect(answer.cautions.map(({ code }) => code)).toContain("stream_of_bubbles")
  })

  test("a bubble at a diffuser's 2 to 2.5 bar carries about 3 times that of a reactor, and the answer says so", () => {
    const at = (counter_pressure_bar: number) =>
      bubbleRate({ ...base, counter_pressure_bar, bubbles_per_s: 2 }).result.mg_per_bubble
    expect(at(2.25) / at(0.2)).toBeGreaterThan(2.5)
    expect(at(2.25) / at(0.2)).toBeLessThan(3.5)
    const { cautions } = bubbleRate({ ...base, bubbles_per_s: 2 })
    expect(cautions.map(({ code }) => code)).toContain("bubbles_do_not_compare")
  })

  test("goes round: bubbles to mg to mL and back", () => {
    fc.assert(
      fc.property(
        between(0.5, 6),
        between(0.01, 20),
        between(0, 9),
        between(5, 35),
        (outlet_diameter_mm, bubbles_per_s, counter_pressure_bar, temperature_c) => {
          const given = { outlet_diameter_mm, counter_pressure_bar, temperature_c }
          const { result } = bubbleRate({ ...given, bubbles_per_s })
          for (const rate of [{ feed_mg_min: result.feed_mg_min }, { feed_ml_min: result.feed_ml_min }]) {
            const back = bubbleRate({ ...given, ...rate }).result
            expect(back.bubbles_per_s / bubbles_per_s).toBeCloseTo(1, 10)
          }
        },
      ),
    )
  })

  test("spreads what was not given by 25 %", () => {
    const counted = bubbleRate({ ...base, bubbles_per_s: 2 })
    expect(counted.uncertainty.feed_high_mg_min / counted.result.feed_mg_min).toBeCloseTo(1.25, 9)
    expect(counted.uncertainty.bubbles_per_s_low).toBe(counted.result.bubbles_per_s)
    const measured = bubbleRate({ ...base, feed_mg_min: 10 })
    expect(measured.uncertainty.bubbles_per_s_high / measured.result.bubbles_per_s).toBeCloseTo(1 / 0.75, 9)
    expect(measured.uncertainty.feed_low_mg_min).toBe(10)
  })

  test.each([{}, { feed_mg_min: 5, bubbles_per_s: 1 }])("refuses %o: exactly one rate", (rates) => {
    expect(() => bubbleRate({ ...base, ...rates })).toThrow("one of bubbles a second")
  })

  test("says when the tube is narrower than the correlation was measured for", () => {
    const codes = (outlet_diameter_mm: number) =>
      bubbleRate({ ...base, outlet_diameter_mm, bubbles_per_s: 1 }).cautions.map(({ code }) => code)
    expect(codes(1)).toContain("narrow_tube")
    expect(codes(2.5)).not.toContain("narrow_tube")
  })
})
