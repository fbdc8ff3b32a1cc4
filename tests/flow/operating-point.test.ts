import fc from "fast-check"
import { describe, expect, test } from "vitest"
import { type ElementInput, elementKinds } from "@/lib/flow/elements"
import { flowDefaults, type LoopInput } from "@/lib/flow/loop-input"
import { cloggingOf } from "@/lib/flow/media"
import { operatingPoint } from "@/lib/flow/operating-point"
import { canisterElements, numbersIn, workedLoop } from "./loops"

describe("worked loops of the design (25 °C, n 1.5, r 0.8), to the printed digit", () => {
  test.each([
    ["60 L, 12 mm", workedLoop(60, 12, 400, 0.7), 222, 211, 152],
    ["120 L, 12 mm", workedLoop(120, 12, 700, 1.2), 335, 314, 240],
    ["180 L, 16 mm", workedLoop(180, 16, 1000, 1.6), 597, 568, 398],
    ["450 L, 16 mm", workedLoop(450, 16, 1850, 2.1), 865, 803, 622],
    ["450 L, 19 mm", workedLoop(450, 19, 1850, 2.1), 1058, 998, 715],
  ])("%s", (_, loop, without, withReactor, due) => {
    const elements = [...loop.elements, { kind: "reactor" as const }]
    const flow = (input: LoopInput) => operatingPoint(input).result.flow_l_h
    expect(Math.abs(flow(loop) - without)).toBeLessThan(0.6)
    expect(Math.abs(flow({ ...loop, elements }) - withReactor)).toBeLessThan(0.6)
    expect(Math.abs(flow({ ...loop, elements, clogging: cloggingOf(5) }) - due)).toBeLessThan(0.6)
  })

  test("the head of the 180 L loop goes where the design says, in cm", () => {
    const loop = workedLoop(180, 16, 1000, 1.6)
    const elements = [...loop.elements, { kind: "reactor" as const }]
    const { head_budget, head_m } = operatingPoint({ ...loop, elements }).result
    const cm = Object.fromEntries(head_budget.map((share) => [share.element, 100 * share.head_m]))
    const printed = {
      media: 28.1,
      hose: 16.7,
      reactor: 12.5,
      barb: 10.0,
      quick_release: 9.4,
      intake_strainer: 6.3,
      lily_outflow: 4.7,
      bend: 3.8,
    }
    for (const [element, head] of Object.entries(printed)) expect(cm[element]).toBeCloseTo(head, 1)
    expect(100 * head_m).toBeCloseTo(91.6, 1)
  })

  test("the shape of the advertised curve leaves 534 to 587 L/h open in the 180 L loop", () => {
    const loop = workedLoop(180, 16, 1000, 1.6)
    const { uncertainty } = operatingPoint({ ...loop, elements: [...loop.elements, { kind: "reactor" }] })
    expect(Math.abs(uncertainty.curve_low_l_h! - 534)).toBeLessThan(0.6)
    expect(Math.abs(uncertainty.curve_high_l_h! - 587)).toBeLessThan(0.6)
  })
})

describe("operatingPoint", () => {
  test("the heads of the elements add up to the pump's head within 1e-9 m, for any loop", () => {
    fc.assert(
      fc.property(anyLoop, (input) => {
        const { result } = operatingPoint(input)
        const sum = result.head_budget.reduce((total, { head_m }) => total + head_m, 0)
        expect(Math.abs(sum - result.head_m)).toBeLessThan(1e-9)
        const { pump } = input
        if ("max_flow_l_h" in pump) {
          const speed = pump.speed_ratio ?? 1
          const share = result.flow_l_h / (speed * pump.max_flow_l_h)
          const pumpHead = speed ** 2 * pump.max_head_m * (1 - share ** 1.5)
          expect(Math.abs(sum - pumpHead)).toBeLessThan(1e-9)
        }
      }),
      { seed: 1 },
    )
  })

  test("answers every valid loop with finite numbers, inside its own interval", () => {
    fc.assert(
      fc.property(anyLoop, (input) => {
        const { result, uncertainty, cautions } = operatingPoint(input)
        for (const value of numbersIn([result, uncertainty])) expect(Number.isFinite(value)).toBe(true)
        expect(uncertainty.flow_low_l_h).toBeLessThanOrEqual(result.flow_l_h)
        expect(uncertainty.flow_high_l_h).toBeGreaterThanOrEqual(result.flow_l_h)
        expect(cautions.map(({ message }) => message).join(" ")).not.toMatch(/NaN|undefined|Infinity/)
      }),
      { seed: 2 },
    )
  })

  const flow = (input: LoopInput) => operatingPoint(input).result.flow_l_h
  test.each<[string, (loop: LoopInput) => LoopInput]>([
    ["a longer hose", (loop) => ({ ...loop, hose: { ...loop.hose, length_m: loop.hose.length_m + 1 } })],
    ["a rougher hose", (loop) => ({ ...loop, hose: { ...loop.hose, roughness_mm: 0.2 } })],
    ["one more bend", (loop) => ({ ...loop, elements: [...loop.elements, { kind: "bend" }] })],
    ["more clogging", (loop) => ({ ...loop, clogging: loop.clogging + 0.1 })],
    ["an outflow higher up", (loop) => ({ ...loop, lift_m: loop.lift_m + 0.02 })],
    ["denser media", (loop) => ({ ...loop, clean_media_fraction: loop.clean_media_fraction - 0.1 })],
  ])("flows less with %s", (_, change) => {
    fc.assert(
      fc.property(turbulentLoop, (loop) => {
        expect(flow(change(loop))).toBeLessThan(flow(loop))
      }),
      { seed: 3, numRuns: 60 },
    )
  })

  test("flows less in colder water while the flow is turbulent", () => {
    fc.assert(
      fc.property(turbulentLoop, (loop) => {
        const colder = operatingPoint({ ...loop, temperature_c: loop.temperature_c - 5 }).result
        // Between laminar and turbulent the friction grows with the Reynolds number, and colder water flows better.
        fc.pre(colder.reynolds > 4000)
        expect(colder.flow_l_h).toBeLessThan(flow(loop))
      }),
      { seed: 4, numRuns: 60 },
    )
  })

  test("flows more through a wider hose and with a stronger pump", () => {
    const loop = workedLoop(180, 12, 1000, 1.6)
    const wider = { ...loop, hose: { ...loop.hose, inner_diameter_mm: 16 } }
    const stronger = { ...loop, pump: { max_flow_l_h: 1200, max_head_m: 1.6 } }
    expect(flow(wider)).toBeGreaterThan(flow(loop))
    expect(flow(stronger)).toBeGreaterThan(flow(loop))
  })

  test("counts a second hose of the same bore like one long hose", () => {
    const loop = workedLoop(180, 16, 1000, 1.6)
    const half = { inner_diameter_mm: 16, length_m: 1.5 }
    expect(flow({ ...loop, hose: half, return_hose: half })).toBeCloseTo(flow(loop), 9)
  })

  test("loses nothing in the media when the maker measured with them in", () => {
    const { result } = operatingPoint({ ...workedLoop(180, 16, 1000, 1.6), clean_media_fraction: 1 })
    expect(result.head_budget.find(({ element }) => element === "media")?.head_m).toBeCloseTo(0, 12)
  })

  test("passes the promised share with clean media and next to no hose", () => {
    const input = {
      ...workedLoop(180, 16, 1000, 1.6),
      hose: { inner_diameter_mm: 60, length_m: 0.1 },
      elements: [],
    }
    expect(flow(input)).toBeCloseTo(800, 0)
  })

  test("crosses the two curves it returns: the loop's head is below the pump's before the flow, above after", () => {
    const { result } = operatingPoint(workedLoop(180, 16, 1000, 1.6))
    for (const [i, point] of result.pump_curve.entries()) {
      const excess = point.head_m - result.loop_curve[i]!.head_m
      expect(Math.sign(excess)).toBe(Math.sign(result.flow_l_h - point.flow_l_h))
      const dueExcess = point.head_m - result.due_loop_curve[i]!.head_m
      expect(Math.sign(dueExcess)).toBe(Math.sign(result.due_flow_l_h - point.flow_l_h))
    }
  })

  test("gives the turnover per hour, and calls 1.8 an hour low", () => {
    const { result, cautions } = operatingPoint(workedLoop(450, 16, 1850, 2.1))
    expect(result.turnover_per_h).toBeCloseTo(result.flow_l_h / 450, 12)
    expect(result.turnover_level).toBe("low")
    expect(cautions.find(({ code }) => code === "low_turnover")?.message).toContain("1.9")
  })

  test("says that transition flow is unsteady and that laminar fittings lose more", () => {
    const codes = (q: number) => operatingPoint(workedLoop(30, 16, q, 0.2)).cautions.map(({ code }) => code)
    expect(codes(150)).toContain("transitional_flow")
    expect(codes(60)).toContain("laminar_fittings")
  })

  test("refuses an outflow above the pump's greatest head, and says how to mend it", () => {
    expect(() => operatingPoint({ ...workedLoop(60, 12, 400, 0.7), lift_m: 0.8 })).toThrow(
      expect.objectContaining({
        code: "out_of_domain",
        field: "lift_m",
        detail: expect.stringContaining("Lower"),
      }),
    )
  })

  test("cites the sources of its formulas and of each fitting", () => {
    const titles = operatingPoint(workedLoop(180, 16, 1000, 1.6)).method.sources.map(({ title }) => title)
    expect(titles.some((title) => title.startsWith("Colebrook"))).toBe(true)
    expect(titles.some((title) => title.startsWith("Crane"))).toBe(true)
    expect(new Set(titles).size).toBe(titles.length)
  })
})

const number = (min: number, max: number) => fc.double({ min, max, noNaN: true })

const anyElement: fc.Arbitrary<ElementInput> = fc.record({
  kind: fc.constantFrom(...elementKinds),
  k: number(0, 20),
  count: fc.integer({ min: 1, max: 6 }),
})
const tableElement: fc.Arbitrary<ElementInput> = fc.record({
  kind: fc.constantFrom(...elementKinds.filter((kind) => kind !== "other")),
})
const hose = fc.record({
  inner_diameter_mm: number(6, 40),
  length_m: number(0.1, 12),
  roughness_mm: number(0, 0.2),
  corrugation_factor: number(1, 4),
})

const anyLoop: fc.Arbitrary<LoopInput> = fc.record(
  {
    pump: fc.oneof(
      fc.record({
        max_flow_l_h: number(50, 10_000),
        max_head_m: number(0.2, 6),
        speed_ratio: number(0.3, 1),
      }),
      fc.record({ flow: number(50, 10_000), head: number(0.2, 6) }).map(({ flow, head }) => ({
        points: [1, 0.9, 0.6, 0.1].map((share, i) => ({ flow_l_h: (flow * i) / 3, head_m: head * share })),
      })),
    ),
    hose,
    return_hose: hose,
    elements: fc.array(fc.oneof(anyElement, tableElement), { maxLength: 8 }),
    volume_l: number(10, 2000),
    temperature_c: number(0, 50),
    clogging: number(0, 1),
    lift_m: fc.constant(0),
    clean_media_fraction: number(0.3, 1),
  },
  {
    requiredKeys: ["pump", "hose", "elements", "temperature_c", "clogging", "lift_m", "clean_media_fraction"],
  },
)

/** Loops as they are sold; every change of them moves the flow by more than the last digits. */
const turbulentLoop: fc.Arbitrary<LoopInput> = fc
  .record({
    pump: fc.record({ max_flow_l_h: number(400, 3000), max_head_m: number(0.8, 3) }),
    hose: fc.record({ inner_diameter_mm: number(9, 25), length_m: number(1, 5) }),
    clogging: number(0, 0.8),
    temperature_c: number(18, 32),
  })
  .map((loop) => ({ ...flowDefaults, ...loop, elements: canisterElements }))
