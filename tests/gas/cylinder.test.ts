import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { gasDensity } from "@/lib/gas/carbon-dioxide"
import { cylinderLife } from "@/lib/gas/cylinder-life"
import { cylinderState, liquidFullTemperature } from "@/lib/gas/cylinder-state"
import { gasDefaults } from "@/lib/gas/defaults"
import { CRITICAL_TEMPERATURE_C, saturation, singlePhasePressure } from "@/lib/gas/equation-of-state"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const life = (more: Partial<Parameters<typeof cylinderLife>[0]>) =>
  cylinderLife({ ...gasDefaults, daily_use_g_day: 11, cylinder_mass_g: 2000, ...more })

describe("saturated CO2 (Span and Wagner 1996)", () => {
  test.each([
    [0, 34.85],
    [10, 45.02],
    [15, 50.87],
    [20, 57.29],
    [25, 64.34],
    [30, 72.14],
    [CRITICAL_TEMPERATURE_C, 73.77],
  ])("stands at %d °C under %d bar", (t, bar) => {
    expect(saturation(t)!.pressure_pa / 1e5).toBeCloseTo(bar, 2)
  })

  test("has no pressure of its own above the critical temperature", () => {
    expect(saturation(31)).toBeNull()
  })

  test("is where the equation of state gives liquid and vapour the same pressure, within 0.3 %", () => {
    for (let t = -20; t <= 28; t += 4) {
      const { pressure_pa, liquid_kg_m3, vapour_kg_m3 } = saturation(t)!
      for (const density_kg_m3 of [liquid_kg_m3, vapour_kg_m3]) {
        const ratio = singlePhasePressure({ density_kg_m3, temperature_c: t }) / pressure_pa
        expect(Math.abs(ratio - 1)).toBeLessThan(0.003)
      }
    }
  })
})

describe("the equation of state", () => {
  /** The specification's table, from the full equation in another program: fill 0.75 and 0.68 kg/L. */
  test.each([
    [0.75, 25, 71.7],
    [0.75, 30, 91.8],
    [0.75, 35, 112],
    [0.75, 40, 133],
    [0.75, 50, 175],
    [0.75, 60, 218],
    [0.68, 25, 64.3],
    [0.68, 30, 76.9],
    [0.68, 35, 92.8],
    [0.68, 40, 109],
    [0.68, 50, 143],
    [0.68, 60, 177],
  ])("a cylinder filled to %d kg/L reads at %d °C %d bar", (fill_kg_l, temperature_c, bar) => {
    const { pressure_bar_abs } = cylinderState({ fill_kg_l, temperature_c })
    expect(Math.abs(pressure_bar_abs / bar - 1)).toBeLessThan(0.005)
  })

  test("puts a cylinder filled by ADR P200 at its test pressure at 65 °C, within 2 %", () => {
    const at65 = (fill: number) => cylinderState({ fill_kg_l: fill, temperature_c: 65 }).pressure_bar_abs
    expect(Math.abs(at65(0.68) / 190 - 1)).toBeLessThan(0.021)
    expect(Math.abs(at65(0.76) / 250 - 1)).toBeLessThan(0.021)
  })

  test.each([
    [0, 5e5, 0.0007],
    [0, 1e6, 0.0034],
    [25, 5e5, 0.0003],
    [25, 1e6, 0.0016],
    [50, 1e6, 0.0007],
  ])(
    "agrees with the second virial coefficient at %d °C and %d Pa within %d",
    (temperature_c, pressure_pa, error) => {
      const density_kg_m3 = gasDensity({ pressure_pa, temperature_c })
      const ratio = singlePhasePressure({ density_kg_m3, temperature_c }) / pressure_pa
      expect(Math.abs(ratio - 1)).toBeLessThan(error)
    },
  )

  test("meets the critical point", () => {
    const pressure = singlePhasePressure({ density_kg_m3: 467.6, temperature_c: CRITICAL_TEMPERATURE_C })
    expect(pressure / 1e6).toBeCloseTo(7.3773, 4)
  })

  test("has a pressure that rises with fill and temperature in every closed cylinder", () => {
    fc.assert(
      fc.property(between(0.02, 0.84), between(-20, 59), (fill_kg_l, temperature_c) => {
        const here = cylinderState({ fill_kg_l, temperature_c }).pressure_bar_abs
        expect(Number.isFinite(here)).toBe(true)
        // The liquid's density formula and the equation of state are 0.3 % apart where one takes over from the other.
        const warmer = cylinderState({ fill_kg_l, temperature_c: temperature_c + 1 }).pressure_bar_abs
        expect(warmer).toBeGreaterThan(here * 0.997)
        const fuller = cylinderState({ fill_kg_l: fill_kg_l + 0.01, temperature_c }).pressure_bar_abs
        expect(fuller).toBeGreaterThanOrEqual(here * 0.997)
      }),
      { numRuns: 500 },
    )
  })
})

describe("a full cylinder", () => {
  test.each([
    [0.75, 22.1],
    [0.68, 26.8],
    [0.76, 21.2],
  ])("filled to %d kg/L is all liquid at %d °C", (fill, t) => {
    expect(liquidFullTemperature(fill)).toBeCloseTo(t, 1)
    expect(cylinderState({ fill_kg_l: fill, temperature_c: t - 0.5 }).phase).toBe("two_phase")
    expect(cylinderState({ fill_kg_l: fill, temperature_c: t + 0.5 }).phase).toBe("liquid_full")
  })

  test("of less than the critical density never is", () => {
    expect(liquidFullTemperature(0.4)).toBeNull()
  })

  test("of hardly more than the critical density is so at the critical temperature", () => {
    expect(liquidFullTemperature(0.46765)).toBeCloseTo(CRITICAL_TEMPERATURE_C, 3)
  })

  test.each([
    [15, 21],
    [20, 26],
    [25, 32],
    [28, 38],
  ])("at %d °C shows a falling gauge once %d %% are left", (ambient_c, percent) => {
    const { liquid_gone_g } = life({ ambient_c }).result
    expect(Math.abs((100 * liquid_gone_g!) / 2000 - percent)).toBeLessThan(0.6)
  })
})

describe("cylinderLife", () => {
  /** Days at 20 °C and 0.75 kg/L without leaks, for the daily use of the three default tanks. */
  test.each([
    [4.4, [112, 224, 448, 1119, 2239]],
    [11.0, [45, 90, 179, 448, 896]],
    [25.8, [19, 38, 76, 191, 382]],
  ])("at %d g a day, from 0.5 to 10 kg", (daily_use_g_day, days) => {
    const cylinders = [500, 1000, 2000, 5000, 10_000].map((cylinder_mass_g) => ({ cylinder_mass_g }))
    const { result } = cylinderLife({
      ...gasDefaults,
      daily_use_g_day,
      cylinders,
      ambient_c: 20,
      usable_fraction: 1,
    })
    for (const [i, expected] of days.entries()) {
      expect(Math.abs(result.cylinders[i]!.days / expected - 1)).toBeLessThan(0.012)
    }
    expect(result.days).toBe(result.cylinders[0]!.days)
  })

  test("costs the price of a refill as often as it is empty", () => {
    const { result } = life({ price: 120, refill_price: 30 })
    expect(result.refills_per_year).toBeCloseTo(365.25 / result.days, 9)
    expect(result.cost_per_month).toBeCloseTo((30 * 30.4375) / result.days, 9)
    expect(result.first_year_cost).toBeCloseTo(120 + (30 * 365.25) / result.days, 9)
    expect(life({}).result.cost_per_month).toBeNull()
  })

  test("uses 95 % of the charge, and never more than what the cut-off leaves", () => {
    expect(life({}).result.usable_g).toBe(1900)
    const all = life({ usable_fraction: 1 }).result
    expect(all.usable_g).toBeCloseTo(2000 - all.residual_g, 9)
    expect(all.residual_g / 2000).toBeCloseTo(0.015, 3)
  })

  test("knows what is left by weight", () => {
    const half = life({ remaining_g: 1000 }).result
    expect(half.days_left).toBeCloseTo(900 / 11, 9)
    expect(half.liquid_present).toBe(true)
    expect(half.pressure_bar_abs).toBeCloseTo(life({}).result.pressure_bar_abs, 9)
    const low = life({ remaining_g: 300 }).result
    expect(low.liquid_present).toBe(false)
    expect(low.pressure_bar_abs).toBeLessThan(50)
  })

  test("judges the fill by the test pressure: 0.68 at 190 bar, 0.76 at 250, none below (ADR P200)", () => {
    const ok = (fill_ratio_kg_l: number, test_pressure_bar: number) =>
      life({ fill_ratio_kg_l, test_pressure_bar }).result.fill_ratio_ok
    expect([ok(0.68, 190), ok(0.69, 190), ok(0.76, 250), ok(0.77, 250), ok(0.3, 150)]).toEqual([
      true,
      false,
      true,
      false,
      false,
    ])
    const { cautions } = life({ fill_ratio_kg_l: 0.8 })
    expect(cautions.find(({ code }) => code === "overfilled")?.severity).toBe("danger")
  })

  test("warns of heat above 30 °C and as a danger above 50", () => {
    const hot = (ambient_c: number) =>
      life({ ambient_c }).cautions.find(({ code }) => code === "hot_cylinder")?.severity
    expect([hot(30), hot(31), hot(51)]).toEqual([undefined, "warning", "danger"])
    expect(life({ ambient_c: 25 }).cautions.map(({ code }) => code)).toContain("liquid_full")
  })

  test("tells the gauge's habit, the test interval, and that a cartridge suits small tanks only", () => {
    const codes = (more: Parameters<typeof life>[0]) => life(more).cautions.map(({ code }) => code)
    expect(codes({})).toEqual(
      expect.arrayContaining(["gauge_is_flat", "end_of_charge", "cylinder_secured", "room_ventilation"]),
    )
    expect(codes({ daily_use_g_day: 0.5 })).toContain("test_interval")
    expect(codes({ cylinder_mass_g: 95 })).toContain("cartridge_uneconomic")
    expect(life({ cylinder_mass_g: 95, usable_fraction: 1 }).result.days).toBeGreaterThan(8)
    expect(life({ cylinder_mass_g: 95, usable_fraction: 1 }).result.days).toBeLessThan(9)
  })

  test.each([
    [{ cylinder_mass_g: undefined }, "cylinder_mass_g"],
    [{ cylinder_mass_g: undefined, cylinders: [] }, "cylinder_mass_g"],
    [{ cylinders: [{ cylinder_mass_g: 500 }] }, "cylinders"],
    [{ remaining_g: 2500 }, "remaining_g"],
    [
      { cylinder_mass_g: undefined, cylinders: [{ cylinder_mass_g: 500, remaining_g: 600 }] },
      "cylinders.0.remaining_g",
    ],
    [{ cylinder_mass_g: undefined, cylinders: [{ cylinder_mass_g: 2 }] }, "cylinders.0.cylinder_mass_g"],
  ])("refuses %o and names the field", (bad, field) => {
    expect(() => life(bad)).toThrow(OutOfDomain)
    expect(() => life(bad)).toThrow(new RegExp(`^${field}:`))
  })

  test("lasts in proportion to its mass and against its use", () => {
    fc.assert(
      fc.property(between(100, 40_000), between(0.1, 500), (cylinder_mass_g, daily_use_g_day) => {
        const here = life({ cylinder_mass_g, daily_use_g_day }).result.days
        expect(life({ cylinder_mass_g: cylinder_mass_g * 1.2, daily_use_g_day }).result.days).toBeCloseTo(
          here * 1.2,
          6,
        )
        expect(life({ cylinder_mass_g, daily_use_g_day: daily_use_g_day * 2 }).result.days).toBeCloseTo(
          here / 2,
          6,
        )
      }),
    )
  })
})
