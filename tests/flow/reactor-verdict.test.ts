import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { operatingPoint } from "@/lib/flow/operating-point"
import type { Criterion } from "@/lib/flow/reactor-criteria"
import { verdicts } from "@/lib/flow/reactor-criteria"
import { type ReactorLoopInput, reactorDefaults } from "@/lib/flow/reactor-input"
import { reactorVerdict } from "@/lib/flow/reactor-verdict"
import { canisterElements, numbersIn, workedLoop } from "./loops"

function workedReactor(
  tank: readonly [number, number, number, number],
  body_diameter_mm: number,
  feed_mg_min: number,
): ReactorLoopInput {
  return {
    ...workedLoop(...tank),
    reactor: { body_diameter_mm, body_length_mm: 350 },
    feed_mg_min,
    inlet_co2_mg_l: reactorDefaults.inlet_co2_mg_l,
  }
}

const tanks = {
  small: workedReactor([60, 12, 400, 0.7], 40, 23.4),
  medium: workedReactor([120, 12, 700, 1.2], 50, 40),
  usual: workedReactor([180, 16, 1000, 1.6], 60, 63.7),
  large: workedReactor([450, 19, 1850, 2.1], 75, 152.8),
}
const found = (input: ReactorLoopInput, criterion: Criterion) =>
  reactorVerdict(input).result.reasons.find((reason) => reason.criterion === criterion)!

describe("worked loops of the design", () => {
  test.each([
    ["60 L", tanks.small, "unsuitable", 211, 0.047, 0.05, 0.81, 0.58],
    ["120 L", tanks.medium, "marginal", 314, 0.044, 0.05, 1.2, 0.92],
    ["180 L", tanks.usual, "suitable", 568, 0.056, 0.08, 1.23, 0.86],
    ["450 L", tanks.large, "marginal", 998, 0.063, 0.1, 1.53, 1.09],
  ])("%s", (_, input, verdict, flow, body, length, jet, jetWhenDue) => {
    const { result } = reactorVerdict(input)
    expect(result.verdict).toBe(verdict)
    expect(Math.abs(result.flow_l_h - flow)).toBeLessThan(0.6)
    expect(result.body_velocity_m_s).toBeCloseTo(body, 3)
    expect(result.required_length_m / 1.5).toBeCloseTo(length, 2)
    expect(Math.abs(result.nozzle_velocity_m_s - jet)).toBeLessThan(0.01)
    const due = result.when_due.reasons.find(({ criterion }) => criterion === "jet_velocity")!
    expect(Math.abs(due.value - jetWhenDue)).toBeLessThan(0.01)
  })

  test("the reactor costs 4.9, 6.1, 4.9 and 5.8 % of the flow", () => {
    const losses = Object.values(tanks).map((input) => 100 * found(input, "flow_loss").value)
    for (const [i, loss] of [4.9, 6.1, 4.9, 5.8].entries())
      expect(Math.abs(losses[i]! - loss)).toBeLessThan(0.1)
  })

  test("in the 450 L tank the reactor itself is fine: only the turnover holds it back", () => {
    const held = reactorVerdict(tanks.large).result.reasons.filter(({ verdict }) => verdict !== "suitable")
    expect(held.map(({ criterion }) => criterion)).toEqual(["turnover"])
  })
})

describe("facts of the trade", () => {
  // Common practice, no source.
  test("a small filter on a small tank cannot run a reactor", () => {
    const { verdict, reasons } = reactorVerdict(tanks.small).result
    expect(verdict).toBe("unsuitable")
    expect(
      reasons.filter((reason) => reason.verdict === "unsuitable").map(({ criterion }) => criterion),
    ).toEqual(["real_flow", "water_volume"])
  })

  // Common practice, no source.
  test("a reactor that suits its loop dissolves practically all gas", () => {
    for (const input of [tanks.usual, tanks.large]) {
      expect(reactorVerdict(input).result.dissolution_fraction).toBeGreaterThan(0.97)
    }
  })

  // Common practice, no source.
  test("a clogged filter makes a reactor noisy: the jet no longer breaks up the gas", () => {
    const { result, cautions } = reactorVerdict({ ...tanks.usual, clogging: 0.9 })
    expect(result.nozzle_velocity_m_s).toBeLessThan(0.8)
    expect(result.verdict).toBe("unsuitable")
    expect(cautions.map(({ code }) => code)).toContain("gas_lock")
    const clean = reactorVerdict(tanks.usual)
    expect(clean.cautions.find(({ code }) => code === "worse_when_clogged")?.message).toContain("noisy")
  })

  // Common practice, no source: the plume is only a few mg/L richer than the tank.
  test("the water leaves the reactor only a few mg/L richer, far from saturation", () => {
    const { result } = reactorVerdict(tanks.usual)
    expect(result.outlet_co2_mg_l - 30).toBeCloseTo((60 * 63.7) / result.flow_l_h, 9)
    expect(result.outlet_saturation_ratio).toBeLessThan(0.05)
  })
})

describe("reactorVerdict", () => {
  test("flushes gas into the tank when the body is too narrow, and gives the flow that it bears", () => {
    const narrow = { ...tanks.large, reactor: { body_diameter_mm: 38, body_length_mm: 350 } }
    const { result, cautions } = reactorVerdict(narrow)
    expect(result.holds_bubbles).toBe(false)
    expect(result.dissolution_fraction).toBeLessThan(1)
    expect(result.maximum_flow_l_h).toBeLessThan(result.flow_l_h)
    expect(found(narrow, "carry_over").verdict).toBe("unsuitable")
    expect(cautions.map(({ code }) => code)).toContain("bubbles_reach_tank")
  })

  test("a bypass slows the body and the jet by its share and gives most of the lost flow back", () => {
    const whole = reactorVerdict(tanks.usual).result
    const half = reactorVerdict({
      ...tanks.usual,
      reactor: { ...tanks.usual.reactor, bypass_fraction: 0.5 },
    }).result
    expect(half.flow_l_h).toBeGreaterThan(whole.flow_l_h)
    expect(half.body_velocity_m_s / half.flow_l_h).toBeCloseTo(
      whole.body_velocity_m_s / whole.flow_l_h / 2,
      12,
    )
    expect(half.minimum_flow_l_h).toBeCloseTo(2 * whole.minimum_flow_l_h, 9)
  })

  test("a reactor named among the elements stands for itself and is counted once", () => {
    const elements = [...canisterElements, { kind: "reactor" as const }]
    expect(reactorVerdict({ ...tanks.usual, elements }).result.flow_l_h).toBeCloseTo(
      reactorVerdict(tanks.usual).result.flow_l_h,
      9,
    )
  })

  test("has the operating point's flow for the same loop", () => {
    const elements = [...canisterElements, { kind: "reactor" as const }]
    const { flow_l_h } = operatingPoint({ ...tanks.usual, elements }).result
    expect(reactorVerdict(tanks.usual).result.flow_l_h).toBeCloseTo(flow_l_h, 9)
  })

  test("lets a trickle of gas sit quietly under the lid, and locks with ten times as much", () => {
    const weak = { ...tanks.usual, clogging: 1 }
    const { aged_cap_mg_min } = reactorVerdict(weak).result
    const quiet = reactorVerdict({ ...weak, feed_mg_min: 0.9 * aged_cap_mg_min })
    expect(quiet.result.reasons.find(({ criterion }) => criterion === "gas_capacity")?.verdict).toBe(
      "suitable",
    )
    expect(quiet.result.dissolution_fraction).toBe(1)
    const locked = reactorVerdict({ ...weak, feed_mg_min: 20 * aged_cap_mg_min })
    expect(locked.result.dissolution_fraction).toBeLessThan(1)
    expect(locked.uncertainty.dissolution_fraction_low).toBeCloseTo(1 / 20, 9)
  })

  test("leaves out what it cannot know without the tank's volume", () => {
    const { volume_l: _, ...withoutVolume } = tanks.usual
    const criteria = reactorVerdict(withoutVolume).result.reasons.map(({ criterion }) => criterion)
    expect(criteria).not.toContain("turnover")
    expect(criteria).not.toContain("water_volume")
  })

  test("refuses water outside the range of the bubbles' rise", () => {
    expect(() => reactorVerdict({ ...tanks.usual, temperature_c: 2 })).toThrow(
      expect.objectContaining({ field: "temperature_c" }),
    )
  })

  test("answers every valid reactor with finite numbers; its verdict is that of its worst reason", () => {
    fc.assert(
      fc.property(anyReactor, (input) => {
        const { result, uncertainty } = reactorVerdict(input)
        for (const value of numbersIn([result, uncertainty])) expect(Number.isFinite(value)).toBe(true)
        const ranks = result.reasons.map(({ verdict }) => verdicts.indexOf(verdict))
        expect(verdicts.indexOf(result.verdict)).toBe(Math.max(...ranks))
        expect(result.dissolution_fraction).toBeGreaterThanOrEqual(0)
        expect(result.dissolution_fraction).toBeLessThanOrEqual(1)
        expect(uncertainty.dissolution_fraction_low).toBeLessThanOrEqual(result.dissolution_fraction)
        if (result.holds_bubbles) expect(result.flow_l_h).toBeLessThan(result.maximum_flow_l_h * (1 + 1e-6))
        // What enters and dissolves is what leaves, in mg an hour.
        const through = result.flow_l_h * (1 - (input.reactor.bypass_fraction ?? 0))
        const gained = (result.outlet_co2_mg_l - input.inlet_co2_mg_l) * through
        expect(gained).toBeCloseTo(60 * input.feed_mg_min * result.dissolution_fraction, 5)
      }),
      { seed: 5, numRuns: 200 },
    )
  })

  test("holds bubbles the better the wider and the longer the body", () => {
    fc.assert(
      fc.property(anyReactor, (input) => {
        const ratio = (reactor: ReactorLoopInput["reactor"]) =>
          found({ ...input, reactor }, "carry_over").value
        const { reactor } = input
        const now = ratio(reactor)
        const wider = { ...reactor, body_diameter_mm: reactor.body_diameter_mm * 1.1 }
        const longer = { ...reactor, body_length_mm: reactor.body_length_mm * 1.1 }
        expect(ratio(wider)).toBeLessThanOrEqual(now)
        expect(ratio(longer)).toBeLessThanOrEqual(now)
      }),
      { seed: 6, numRuns: 60 },
    )
  })
})

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true })

const anyReactor: fc.Arbitrary<ReactorLoopInput> = fc
  .record({
    pump: fc.record({ max_flow_l_h: number(50, 10_000), max_head_m: number(0.2, 6) }),
    hose: fc.record({ inner_diameter_mm: number(9, 25), length_m: number(0.5, 6) }),
    volume_l: number(20, 1000),
    temperature_c: number(5, 40),
    clogging: number(0, 1),
    reactor: fc.record({
      body_diameter_mm: number(20, 150),
      body_length_mm: number(50, 1000),
      bypass_fraction: fc.oneof(fc.constant(0), number(0, 0.95)),
      water_pressure_bar_abs: number(1.05, 1.6),
    }),
    feed_mg_min: number(0.1, 500),
    inlet_co2_mg_l: number(0, 200),
  })
  .map((input) => ({ ...reactorDefaults, ...input, elements: canisterElements }))
