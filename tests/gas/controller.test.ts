import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { carbonateSystem, co2AtPh, phAtCo2 } from "@/lib/chemistry/carbonate"
import type { TankBalance } from "@/lib/gas/balance"
import { controlCycle } from "@/lib/gas/control-cycle"
import type { Controller } from "@/lib/gas/controlled-plant"
import { controllerDay } from "@/lib/gas/controller-day"
import { type GasSchedule, simulateController } from "@/lib/gas/controller-simulation"
import { gasDefaults } from "@/lib/gas/defaults"
import { phCurve } from "@/lib/gas/ph-curve"
import { OutOfDomain } from "@/lib/units/out-of-domain"

const between = (min: number, max: number) => fc.double({ min, max, noNaN: true })
const system = carbonateSystem({ temperature_c: 25, ionic_strength_mol_l: 0.003 })

describe("controlCycle", () => {
  const tank: TankBalance = {
    volume_l: 336,
    exchange_per_h: 0.24,
    air_co2_mg_l: 0.61,
    plant_uptake_mg_l_h: 0.6,
    respiration_mg_l_h: 0,
    dissolution_efficiency: 1,
  }
  const band = { feed_mg_min: 176.4, low_co2_mg_l: 24.42, high_co2_mg_l: 30.74, lit: true }

  test("gives the specification's check: 0.8648 cycles an hour, duty 0.2240", () => {
    const cycle = controlCycle(tank, band)
    if (typeof cycle === "string") throw new Error(cycle)
    expect(Math.abs(cycle.cycles_per_h / 0.8648 - 1)).toBeLessThan(0.001)
    expect(Math.abs(cycle.duty_fraction / 0.224 - 1)).toBeLessThan(0.001)
  })

  test("names the valve that never closes and the one that never opens", () => {
    expect(controlCycle(tank, { ...band, feed_mg_min: 30 })).toBe("always_on")
    const resting = { ...tank, respiration_mg_l_h: 0.24 * 25, plant_uptake_mg_l_h: 0 }
    expect(controlCycle(resting, band)).toBe("always_off")
  })
})

describe("phCurve", () => {
  test("follows the carbonate model within 3e-4 pH from 0.01 to 3000 mg/L", () => {
    fc.assert(
      fc.property(between(Math.log(0.01), Math.log(3000)), between(0.5, 20), (logCo2, kh_dkh) => {
        const co2_mg_l = Math.exp(logCo2)
        const difference = phCurve(system, kh_dkh)(co2_mg_l) - phAtCo2(system, { co2_mg_l, kh_dkh })
        expect(Math.abs(difference)).toBeLessThan(3e-4)
      }),
    )
  })
})

interface Plant {
  readonly co2: number
  readonly switches: number
  readonly open_min: number
  readonly max: number
}

/** The same plant in Euler steps of a twentieth of a second, pH by the carbonate model: another program. */
function eulerDay(controller: Controller, schedule: GasSchedule, co2Start: number, kh_dkh: number): Plant {
  const dt = 1 / 1200
  const { tank } = controller
  let co2 = co2Start
  let held_mg = 0
  let probe = phAtCo2(system, { co2_mg_l: co2, kh_dkh })
  let ph = probe
  let open = false
  let switches = 0
  let open_min = 0
  let max = co2
  const steps = Math.round(schedule.duration_min / dt)
  for (let i = 0; i < steps; i++) {
    const time = i * dt
    const gas = time < schedule.gas_until_min
    const want: boolean = gas && (open ? probe > controller.off_ph : probe >= controller.on_ph)
    if (want !== open) switches++
    open = want
    const lit = time >= schedule.lights_from_min && time < schedule.lights_until_min
    const release = held_mg / controller.line_lag_min
    held_mg += dt * ((open ? controller.feed_mg_min : 0) - release)
    const supply = (tank.dissolution_efficiency * release) / tank.volume_l
    const loss = (tank.exchange_per_h * (co2 - tank.air_co2_mg_l) + (lit ? tank.plant_uptake_mg_l_h : 0)) / 60
    co2 += dt * (supply - loss)
    // pH moves slowly enough to be looked up every second.
    if (i % 20 === 0) ph = phAtCo2(system, { co2_mg_l: co2, kh_dkh })
    probe += (dt * (ph - probe)) / controller.probe_lag_min
    if (open) open_min += dt
    max = Math.max(max, co2)
  }
  return { co2, switches, open_min, max }
}

describe("simulateController", () => {
  const tank: TankBalance = {
    volume_l: 180,
    exchange_per_h: 0.126,
    air_co2_mg_l: 0.61,
    plant_uptake_mg_l_h: 1,
    respiration_mg_l_h: 0,
    dissolution_efficiency: 1,
  }
  const schedule = {
    duration_min: 1440,
    gas_until_min: 495.5,
    lights_from_min: 75.25,
    lights_until_min: 555.5,
  }
  const setpoint = phAtCo2(system, { co2_mg_l: 30, kh_dkh: 4 })
  const controller: Controller = {
    tank,
    feed_mg_min: 63,
    off_ph: setpoint,
    on_ph: setpoint + 0.1,
    probe_lag_min: 1,
    line_lag_min: 1,
    ph: phCurve(system, 4),
  }
  const start = (c: Controller, co2_mg_l: number) => ({
    co2_mg_l,
    source_mg_l_min: 0,
    probe_ph: c.ph(co2_mg_l),
  })

  test.each([
    ["the default tank", controller],
    ["long lags", { ...controller, probe_lag_min: 3, line_lag_min: 5 }],
    ["a narrow band and a strong feed", { ...controller, on_ph: setpoint + 0.03, feed_mg_min: 200 }],
  ])("agrees with another program in steps of a twentieth of a second: %s", (_, c) => {
    const run = simulateController(c, schedule, start(c, 4.5))
    const other = eulerDay(c, schedule, 4.5, 4)
    expect(run.switches).toBe(other.switches)
    expect(Math.abs(run.open_min / other.open_min - 1)).toBeLessThan(0.004)
    expect(Math.abs(run.max_co2_mg_l / other.max - 1)).toBeLessThan(0.003)
    expect(Math.abs(run.end.co2_mg_l / other.co2 - 1)).toBeLessThan(0.004)
  })

  test("without lags meets the closed form", () => {
    const quick = { ...controller, probe_lag_min: 0, line_lag_min: 0 }
    const always = { duration_min: 6000, gas_until_min: 6000, lights_from_min: 0, lights_until_min: 6000 }
    const { holding } = simulateController(quick, always, start(quick, 30))
    const cycle = controlCycle(tank, {
      feed_mg_min: 63,
      low_co2_mg_l: co2AtPh(system, { ph: setpoint + 0.1, kh_dkh: 4 }),
      high_co2_mg_l: 30,
      lit: true,
    })
    if (typeof cycle === "string" || !holding) throw new Error("does not cycle")
    expect(((60 * holding.cycles) / holding.minutes) * (1 / cycle.cycles_per_h)).toBeCloseTo(1, 2)
    expect(holding.open_min / holding.minutes / cycle.duty_fraction).toBeCloseTo(1, 2)
    expect(holding.max_co2_mg_l).toBeCloseTo(30, 1)
  })

  test("never opens outside the gate, and gas held in the line still dissolves after it", () => {
    const samples = new Float64Array(1441)
    const run = simulateController(controller, schedule, start(controller, 4.5), samples)
    expect(run.open_min).toBeLessThan(schedule.gas_until_min)
    for (let minute = 510; minute < 1440; minute++) expect(samples[minute + 1]).toBeLessThan(samples[minute]!)
    const shut = simulateController(controller, { ...schedule, gas_until_min: 0 }, start(controller, 4.5))
    expect(shut.switches).toBe(0)
    expect(shut.open_min).toBe(0)
    const slow = { ...controller, line_lag_min: 10 }
    const late = simulateController(slow, schedule, start(slow, 4.5))
    expect(late.max_co2_mg_l).toBeGreaterThan(run.max_co2_mg_l)
  })

  test("comes to an end, with the same day, when gate and light are a breath apart", () => {
    const hair = { ...schedule, gas_until_min: schedule.gas_until_min + 1e-156, lights_from_min: 6.5e-156 }
    const plain = { ...schedule, lights_from_min: 0 }
    const slow = { ...controller, probe_lag_min: 15 }
    const run = simulateController(slow, hair, start(slow, 4.5))
    const other = simulateController(slow, plain, start(slow, 4.5))
    expect(run.switches).toBe(other.switches)
    expect(run.end.co2_mg_l).toBeCloseTo(other.end.co2_mg_l, 6)
  })

  test("keeps what went in: gas fed is gas released, lost, taken up or stored", () => {
    const run = simulateController(controller, schedule, start(controller, 4.5))
    const samples = new Float64Array(1441)
    simulateController(controller, schedule, start(controller, 4.5), samples)
    let excess = 0
    for (let i = 0; i < 1440; i++) excess += (samples[i]! + samples[i + 1]!) / 2 - tank.air_co2_mg_l
    const lost = (180 * tank.exchange_per_h * excess) / 60
    const stored = 180 * (run.end.co2_mg_l - 4.5)
    const taken = (180 * (schedule.lights_until_min - schedule.lights_from_min)) / 60
    expect(Math.abs((run.open_min * 63) / (lost + taken + stored) - 1)).toBeLessThan(0.001)
  })
})

describe("controllerDay", () => {
  const base = { ...gasDefaults, photoperiod_h: undefined, kh_dkh: 4, volume_l: 180, surface_area_m2: 0.4 }

  test("the default tank at 63 mg/min: about 4 cycles a day, duty 0.21, faster with half the hysteresis", () => {
    const { result } = controllerDay({ ...base, feed_mg_min: 63 })
    expect(Math.abs(result.duty_fraction - 0.21)).toBeLessThan(0.01)
    expect(Math.abs(result.cycles_per_h - 0.48)).toBeLessThan(0.03)
    expect(result.switches_per_day / 2).toBe(4)
    const narrow = controllerDay({ ...base, feed_mg_min: 63, hysteresis_ph: 0.05 }).result
    expect(Math.abs(narrow.cycles_per_h / 0.83 - 1)).toBeLessThan(0.1)
  })

  test("overshoots a little above the set-point and uses about what the demand says", () => {
    const { result } = controllerDay(base)
    expect(result.setpoint_co2_mg_l).toBe(30)
    expect(result.overshoot_mg_l).toBeGreaterThan(0)
    expect(result.overshoot_mg_l).toBeLessThan(1.5)
    expect(result.min_ph).toBeLessThan(result.setpoint_ph)
    expect(Math.abs(result.daily_use_g_day / 10.5 - 1)).toBeLessThan(0.08)
  })

  test("always says what the feed does without a controller, and how long the valve may stay open", () => {
    const { result, cautions } = controllerDay(base)
    expect(result.uncontrolled_co2_mg_l).toBeGreaterThan(100)
    expect(cautions.map(({ code }) => code)).toEqual(
      expect.arrayContaining([
        "unthrottled_feed",
        "limit_open_time",
        "probe_error",
        "gate_by_light",
        "livestock",
      ]),
    )
  })

  test("gives the day on the clock, highest at noon for lights from 10 to 18", () => {
    const { series } = controllerDay({ ...base, lights_on_h: 10, lights_off_h: 18 }).result
    expect(series[0]?.t_min).toBe(0)
    expect(series.at(-1)?.t_min).toBe(1440)
    expect(series.at(-1)?.co2_mg_l).toBeCloseTo(series[0]!.co2_mg_l, 1)
    const noon = series.find(({ t_min }) => t_min === 720)!.co2_mg_l
    const early = series.find(({ t_min }) => t_min === 480)!.co2_mg_l
    expect(noon).toBeGreaterThan(4 * early)
  })

  test("goes over midnight as well", () => {
    const day = controllerDay({ ...base, lights_on_h: 10, lights_off_h: 18 }).result
    const night = controllerDay({ ...base, lights_on_h: 20, lights_off_h: 4 }).result
    expect(night.daily_use_g_day).toBeCloseTo(day.daily_use_g_day, 9)
    const at = (series: typeof day.series, t: number) => series.find(({ t_min }) => t_min === t)!.co2_mg_l
    expect(at(night.series, 1320)).toBeCloseTo(at(day.series, 720), 6)
  })

  test("a feed that is too small never closes the valve: duty 1 and a caution", () => {
    const { result, cautions } = controllerDay({ ...base, feed_ratio: 0.5, open_before_lights_min: 75 })
    expect(result.reached_after_min).toBeNull()
    expect(result.duty_fraction).toBe(1)
    expect(result.overshoot_mg_l).toBe(0)
    expect(cautions.map(({ code }) => code)).toContain("never_reached")
  })

  test("longer lags overshoot further and a strong one is cautioned", () => {
    const over = (delay_min: number) => controllerDay({ ...base, delay_min, feed_ratio: 8 })
    expect(over(5).result.overshoot_mg_l).toBeGreaterThan(over(1).result.overshoot_mg_l)
    expect(over(15).cautions.map(({ code }) => code)).toContain("overshoot")
  })

  test("a set-point replaces the target", () => {
    const { result } = controllerDay({ ...base, setpoint_ph: 6.8 })
    expect(result.setpoint_co2_mg_l).toBeCloseTo(co2AtPhOf(6.8), 1)
  })

  test("the interval of the highest CO2 is what the probe leaves open", () => {
    const { result, uncertainty } = controllerDay({ ...base, kh_error_dkh: 0, temperature_error_c: 0 })
    const factor = uncertainty.max_co2_high_mg_l / result.max_co2_mg_l
    // 1.96 standard errors of 0.1 pH, and 2 % of the model.
    expect(factor).toBeCloseTo(Math.exp(1.96 * Math.hypot(0.23045, 0.02)), 2)
    expect(uncertainty.max_co2_low_mg_l * factor).toBeCloseTo(result.max_co2_mg_l, 6)
  })

  test.each([
    [{ lights_off_h: 18, photoperiod_h: 9 }, "photoperiod_h"],
    [{ lights_off_h: 10 }, "lights_off_h"],
    [{ setpoint_ph: 8.4 }, "setpoint_ph"],
    [{ open_before_lights_min: 961 }, "open_before_lights_min"],
    [{ close_before_lights_off_min: 480 }, "close_before_lights_off_min"],
    [{ feed_mg_min: 2000 }, "feed_mg_min"],
    [{ feed_ml_min: 1100 }, "feed_ml_min"],
    [{ feed_mg_min: 20, feed_ml_min: 10 }, "feed_ml_min"],
    [{ hysteresis_ph: 0 }, "hysteresis_ph"],
  ])("refuses %o and names the field", (bad, field) => {
    expect(() => controllerDay({ ...base, ...bad })).toThrow(OutOfDomain)
    expect(() => controllerDay({ ...base, ...bad })).toThrow(new RegExp(`^${field}:`))
  })
})

function co2AtPhOf(ph: number): number {
  // The default ionic strength of 4 dKH water: 1.5 Alk + 1 mmol/L.
  const water = carbonateSystem({ temperature_c: 25, ionic_strength_mol_l: 1.5 * 1.4266e-3 + 0.001 })
  return co2AtPh(water, { ph, kh_dkh: 4 })
}
