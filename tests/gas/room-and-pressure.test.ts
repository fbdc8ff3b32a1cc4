import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { gasDefaults } from "@/lib/gas/defaults"
import { gasVolume, leakLevelAfter, steadyLeakLevel } from "@/lib/gas/room-air"
import { roomSafety } from "@/lib/gas/room-safety"
import { workingPressure } from "@/lib/gas/working-pressure"

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })

describe("roomSafety", () => {
  const at = (cylinder_mass_g: number, room_volume_m3: number, more = {}) =>
    roomSafety({ ...gasDefaults, room_c: 22, background_ppm: 420, cylinder_mass_g, room_volume_m3, ...more })

  /** The specification's examples at 22 °C. */
  test.each([
    [2000, 30, 36_200, "leave"],
    [2000, 50, 22_100, "ventilate"],
    [500, 15, 18_500, "ventilate"],
    [5000, 30, 87_600, "life_danger"],
    [100, 50, 1500, "ok"],
  ])("%d g in %d m³ peak at %d ppm: %s", (mass, volume, ppm, verdict) => {
    const { result, cautions } = at(mass, volume)
    expect(Math.abs(result.peak_ppm / ppm - 1)).toBeLessThan(0.03)
    expect(result.verdict).toBe(verdict)
    const severity = { ok: "info", ventilate: "warning" }[verdict] ?? "danger"
    expect(cautions.find(({ code }) => code === "full_release")?.severity).toBe(severity)
  })

  test("a kilogram is 0.553 m³ at 25 °C, real gas", () => {
    expect(gasVolume({ mass_g: 1000, room_c: 25 })).toBeCloseTo(0.553, 3)
  })

  test("normal dosing of 11 g a day in 30 m³ at half an air change adds about 17 ppm", () => {
    expect(at(2000, 30, { daily_use_g_day: 11 }).result.dosing_ppm).toBeCloseTo(17, 0)
  })

  test("takes the room's sides, and refuses neither", () => {
    const sides = { room_volume_m3: undefined, room_length_m: 4, room_width_m: 3, room_height_m: 2.5 }
    expect(at(2000, 0, sides).result.peak_ppm).toBeCloseTo(at(2000, 30).result.peak_ppm, 9)
    expect(() => at(2000, 0, { room_volume_m3: undefined })).toThrow(/^room_volume_m3:/)
  })

  test("without air changes says that it never clears", () => {
    const { result, cautions } = at(2000, 30, { air_changes_per_h: 0 })
    expect(result.hours_above_5000_ppm).toBeNull()
    expect(cautions.map(({ code }) => code)).toContain("no_ventilation")
    expect(at(50, 50, { air_changes_per_h: 0 }).result.hours_above_5000_ppm).toBe(0)
  })

  test("gives leak, cabinet and pooling cautions where they apply", () => {
    const codes = at(5000, 30, { leak_g_h: 500 }).cautions.map(({ code }) => code)
    expect(codes).toEqual(expect.arrayContaining(["leak", "cabinet_vents", "pools_low", "cylinder_secured"]))
  })

  test("is worse with more gas, less room and less ventilation", () => {
    fc.assert(
      fc.property(between(100, 20_000), between(5, 500), between(0.1, 5), (mass, volume, changes) => {
        const here = at(mass, volume, { air_changes_per_h: changes }).result
        expect(at(mass * 1.1, volume).result.peak_ppm).toBeGreaterThan(here.peak_ppm)
        expect(at(mass, volume * 1.1).result.peak_ppm).toBeLessThan(here.peak_ppm)
        const stale = at(mass, volume, { air_changes_per_h: changes / 2 }).result
        expect(stale.hours_above_5000_ppm!).toBeGreaterThanOrEqual(here.hours_above_5000_ppm!)
        expect(stale.mean_8h_ppm).toBeGreaterThan(here.mean_8h_ppm)
        expect(here.peak_ppm).toBeLessThanOrEqual(1e6)
      }),
    )
  })

  test("the mean over 8 h is that of the decay, by the trapezium rule", () => {
    const { result } = at(2000, 30)
    let sum = 0
    const steps = 8000
    for (let i = 0; i <= steps; i++) {
      const level = 420 + (result.peak_ppm - 420) * Math.exp((-0.5 * 8 * i) / steps)
      sum += (i === 0 || i === steps ? 0.5 : 1) * level
    }
    expect(result.mean_8h_ppm).toBeCloseTo(sum / steps, 1)
  })

  test("a leak approaches its steady level", () => {
    const room = { room_volume_m3: 30, air_changes_per_h: 0.5, room_c: 22, background_ppm: 420 }
    expect(leakLevelAfter(room, 20, 0)).toBeCloseTo(420, 9)
    expect(leakLevelAfter(room, 20, 100)).toBeCloseTo(steadyLeakLevel(room, 20), 6)
    expect(steadyLeakLevel({ ...room, air_changes_per_h: 0 }, 20)).toBe(1e6)
    expect(steadyLeakLevel(room, 0)).toBe(420)
  })
})

describe("workingPressure", () => {
  const at = (more: Partial<Parameters<typeof workingPressure>[0]>) =>
    workingPressure({ ...gasDefaults, ...more })

  /** Bubble point 4σ/d at 25 °C, Young and Laplace. */
  test.each([
    [5, 0.58],
    [3, 0.96],
    [2, 1.44],
    [1.5, 1.92],
    [1, 2.88],
  ])("pores of %d µm ask for %d bar", (pore_diameter_um, bar) => {
    expect(at({ method: "diffuser", pore_diameter_um }).result.element_bar).toBeCloseTo(bar, 2)
  })

  test("the line takes 17 Pa: 2 m of 2.5 mm at 60 mg/min", () => {
    expect(at({}).result.line_bar * 1e5).toBeCloseTo(17, 0)
  })

  test("is the sum of its parts and half a bar for the needle valve", () => {
    const { result } = at({ method: "diffuser" })
    const parts = result.element_bar + result.water_bar + result.check_valve_bar + result.line_bar
    expect(result.working_pressure_bar).toBeCloseTo(parts + 0.5, 12)
    expect(result.low_bar).toBeLessThan(result.working_pressure_bar)
    expect(result.high_bar).toBeGreaterThan(result.working_pressure_bar)
  })

  test("judges a setting", () => {
    const verdict = (setting_bar: number) => at({ setting_bar }).result.verdict
    expect([0.2, 0.6, 1, 2.5, 4.5].map(verdict)).toEqual([
      "too_low",
      "unsteady",
      "sufficient",
      "hard_to_trim",
      "check_hose",
    ])
    expect(at({ setting_bar: 0.2 }).cautions[0]?.message).toContain("0.2 bar")
    expect(at({}).result.verdict).toBe("sufficient")
    expect(at({ method: "diffuser", pore_diameter_um: 0.5 }).result.verdict).toBe("check_hose")
  })

  test("always speaks of the check valve", () => {
    expect(at({}).cautions.map(({ code }) => code)).toContain("check_valve")
  })

  test("grows with depth, check valve, line and finer pores", () => {
    fc.assert(
      fc.property(
        between(0, 2.9),
        between(0, 0.9),
        between(0, 40),
        between(0.6, 40),
        (depth_m, valve, line, pore) => {
          const base = {
            method: "diffuser" as const,
            depth_m,
            check_valve_bar: valve,
            line_length_m: line,
            pore_diameter_um: pore,
          }
          const bar = (more: object) => at({ ...base, ...more }).result.working_pressure_bar
          const here = bar({})
          expect(bar({ depth_m: depth_m + 0.1 })).toBeGreaterThan(here)
          expect(bar({ check_valve_bar: valve + 0.1 })).toBeGreaterThan(here)
          expect(bar({ line_length_m: line + 1 })).toBeGreaterThan(here)
          expect(bar({ pore_diameter_um: pore * 0.9 })).toBeGreaterThan(here)
        },
      ),
    )
  })
})
