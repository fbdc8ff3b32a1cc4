import fc from "fast-check"
import { describe, expect, it } from "vitest"
import type { Answer } from "@/lib/chemistry/answer"
import { bubbleRate } from "@/lib/gas/bubble-rate"
import { controllerDay } from "@/lib/gas/controller-day"
import { cylinderLife } from "@/lib/gas/cylinder-life"
import { gasDemand } from "@/lib/gas/demand"
import { AGITATION_K600_CM_H } from "@/lib/gas/exchange"
import { leadTime } from "@/lib/gas/lead-time"
import { gasMethods } from "@/lib/gas/methods"
import { roomSafety } from "@/lib/gas/room-safety"
import { workingPressure } from "@/lib/gas/working-pressure"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { type QuantityName, quantities } from "@/lib/units/quantities"

/** Any value of a quantity, its two ends included; `usual` narrows it to where tanks are. */
const any = (name: QuantityName, usual?: readonly [number, number]) => {
  const { min, max } = quantities[name]
  const whole = fc.oneof(fc.constantFrom(min, max), fc.double({ min, max, noNaN: true }))
  if (!usual) return whole
  return fc.oneof(
    { arbitrary: fc.double({ min: usual[0], max: usual[1], noNaN: true }), weight: 9 },
    { arbitrary: whole, weight: 1 },
  )
}
const maybe = (name: QuantityName, usual?: readonly [number, number]) =>
  fc.option(any(name, usual), { nil: undefined, freq: 2 })
const method = fc.constantFrom(...(Object.keys(gasMethods) as (keyof typeof gasMethods)[]))

const tank = {
  kh_dkh: any("kh_dkh", [1, 15]),
  ionic_strength_mol_l: maybe("ionic_strength_mol_l"),
  conductivity_us_cm: maybe("conductivity_us_cm", [50, 2000]),
  temperature_c: any("temperature_c", [18, 32]),
  air_co2_ppm: any("air_co2_ppm", [400, 1500]),
  altitude_m: any("altitude_m", [0, 2000]),
  volume_l: any("volume_l", [20, 1000]),
  surface_area_m2: any("surface_area_m2", [0.1, 2]),
  target_co2_mg_l: any("target_co2_mg_l", [8, 40]),
  agitation: fc.constantFrom(...(Object.keys(AGITATION_K600_CM_H) as (keyof typeof AGITATION_K600_CM_H)[])),
  overnight: fc.option(
    fc.record({
      start_ph: any("start_ph", [6.2, 6.8]),
      end_ph: any("end_ph", [6.8, 7.4]),
      elapsed_h: any("elapsed_h", [2, 12]),
    }),
    { nil: undefined, freq: 4 },
  ),
  method,
  dissolution_efficiency: maybe("dissolution_efficiency"),
  bubble_diameter_mm: maybe("bubble_diameter_mm"),
  depth_m: any("depth_m"),
  plant_uptake_mg_l_h: any("plant_uptake_mg_l_h", [0, 3]),
  rest_co2_mg_l: maybe("rest_co2_mg_l", [2, 5]),
  reach_fraction: any("reach_fraction"),
  close_before_lights_off_min: any("close_before_lights_off_min", [0, 90]),
}
const feed = {
  feed_mg_min: maybe("feed_mg_min", [5, 200]),
  feed_ml_min: fc.constant(undefined),
  feed_ratio: any("feed_ratio", [0.5, 10]),
}

const questions = {
  gasDemand: [
    gasDemand,
    fc.record({
      ...tank,
      photoperiod_h: any("photoperiod_h", [6, 12]),
      wished_lead_min: any("wished_lead_min", [30, 180]),
    }),
  ],
  leadTime: [leadTime, fc.record({ ...tank, ...feed, photoperiod_h: any("photoperiod_h", [6, 12]) })],
  controllerDay: [
    controllerDay,
    fc.record({
      ...tank,
      ...feed,
      lights_on_h: any("lights_on_h"),
      lights_off_h: maybe("lights_off_h"),
      photoperiod_h: fc.constant(undefined),
      open_before_lights_min: maybe("open_before_lights_min", [30, 300]),
      setpoint_ph: maybe("setpoint_ph", [6.2, 7.2]),
      hysteresis_ph: any("hysteresis_ph"),
      delay_min: any("delay_min"),
      probe_lag_min: any("probe_lag_min"),
      ph_error: any("ph_error"),
      kh_error_dkh: any("kh_error_dkh"),
      temperature_error_c: any("temperature_error_c"),
    }),
  ],
  cylinderLife: [
    cylinderLife,
    fc.record({
      daily_use_g_day: any("daily_use_g_day", [0.5, 100]),
      cylinder_mass_g: any("cylinder_mass_g"),
      remaining_g: maybe("remaining_g"),
      fill_ratio_kg_l: maybe("fill_ratio_kg_l"),
      test_pressure_bar: maybe("test_pressure_bar"),
      price: maybe("price"),
      refill_price: maybe("refill_price"),
      usable_fraction: any("usable_fraction"),
      ambient_c: any("ambient_c"),
      cut_off_bar_abs: any("cut_off_bar_abs"),
    }),
  ],
  bubbleRate: [
    bubbleRate,
    fc
      .tuple(
        fc.record({
          outlet_diameter_mm: any("outlet_diameter_mm"),
          temperature_c: any("temperature_c"),
          counter_pressure_bar: any("counter_pressure_bar"),
        }),
        fc.oneof(
          fc.record({ bubbles_per_s: any("bubbles_per_s") }),
          fc.record({ feed_ml_min: any("feed_ml_min") }),
          fc.record({ feed_mg_min: any("feed_mg_min") }),
        ),
      )
      .map(([counter, rate]) => ({ ...counter, ...rate })),
  ],
  workingPressure: [
    workingPressure,
    fc.record({
      method,
      depth_m: any("depth_m"),
      check_valve_bar: any("check_valve_bar"),
      line_length_m: any("line_length_m"),
      line_diameter_mm: any("line_diameter_mm"),
      pore_diameter_um: maybe("pore_diameter_um"),
      feed_mg_min: maybe("feed_mg_min"),
      setting_bar: maybe("setting_bar"),
    }),
  ],
  roomSafety: [
    roomSafety,
    fc.record({
      cylinder_mass_g: any("cylinder_mass_g"),
      room_volume_m3: any("room_volume_m3"),
      air_changes_per_h: any("air_changes_per_h"),
      room_c: any("room_c"),
      background_ppm: any("background_ppm"),
      leak_g_h: maybe("leak_g_h"),
      daily_use_g_day: maybe("daily_use_g_day"),
    }),
  ],
  // biome-ignore lint/suspicious/noExplicitAny: each question has its own input.
} as const satisfies Record<string, readonly [(input: any) => Answer<object, object>, fc.Arbitrary<object>]>

describe.each(Object.entries(questions))("%s, on any input within its bounds", (_, [ask, input]) => {
  it("answers with finite numbers in words that carry them, or refuses and names a field of the input", () => {
    let answered = 0
    const numRuns = 500
    fc.assert(
      fc.property(input as fc.Arbitrary<object>, (given) => {
        let answer: Answer<object, object>
        try {
          answer = (ask as (input: object) => Answer<object, object>)(given)
        } catch (error) {
          expect(error).toBeInstanceOf(OutOfDomain)
          const { field, detail } = error as OutOfDomain
          expect(Object.keys(given)).toContain(field.split(".")[0])
          expect(detail.length).toBeGreaterThan(20)
          return
        }
        answered++
        for (const { message } of [...answer.cautions, ...answer.assumptions]) {
          expect(message).not.toMatch(/NaN|Infinity|undefined|\de[+-]\d/)
        }
        const ids = answer.method.sources.map(({ title }) => title)
        expect(new Set(ids).size).toBe(ids.length)
        everyNumber(answer, (value, path) => expect(Number.isFinite(value), path).toBe(true))
        notNegative(answer.result)
        expect(answer.cautions.every(({ message }) => message.length > 20)).toBe(true)
        expect(answer.method.sources.length).toBeGreaterThan(0)
      }),
      { numRuns },
    )
    expect(answered).toBeGreaterThan(numRuns / 20)
  })
})

describe("every number of a gas answer", () => {
  it("has a quantity of its name, with unit and words", () => {
    const unnamed = new Set<string>()
    for (const [ask, input] of Object.values(questions)) {
      for (const given of fc.sample(input as fc.Arbitrary<object>, 40)) {
        try {
          const { result, uncertainty } = (ask as (input: object) => Answer<object, object>)(given)
          everyNumber({ result, uncertainty }, (_, path) => {
            const last = path.split(".").at(-1)!
            if (!(last in quantities)) unnamed.add(last)
          })
        } catch (error) {
          expect(error).toBeInstanceOf(OutOfDomain)
        }
      }
    }
    expect([...unnamed]).toEqual([])
  })
})

function everyNumber(value: unknown, check: (value: number, path: string) => void, path = "answer"): void {
  if (typeof value === "number") check(value, path)
  else if (typeof value === "object" && value !== null) {
    for (const [name, inner] of Object.entries(value)) everyNumber(inner, check, `${path}.${name}`)
  }
}

/** What is an amount of something: all but temperatures and what may truly be below zero. */
function notNegative(result: object): void {
  for (const [name, value] of Object.entries(result)) {
    if (typeof value !== "number" || name === "liquid_full_c") continue
    // A tank that takes CO2 out of the air loses a negative amount; an overshoot may fall short of the set-point.
    if (name === "loss_to_air_g_day") continue
    expect(value, name).toBeGreaterThanOrEqual(name === "overshoot_mg_l" ? -1 : -1e-9)
  }
}
