import fc from "fast-check"
import { describe, expect, it } from "vitest"
import type { Answer } from "@/lib/chemistry/answer"
import { carbonateSystem, co2AtPh, speciesAtPh } from "@/lib/chemistry/carbonate"
import { co2FromDropChecker } from "@/lib/chemistry/co2-from-drop-checker"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { baselines, co2FromPhDrop } from "@/lib/chemistry/co2-from-ph-drop"
import { co2Grid } from "@/lib/chemistry/co2-grid"
import { colourBands } from "@/lib/chemistry/colour-bands"
import { khFromCo2 } from "@/lib/chemistry/kh-from-co2"
import { phForCo2 } from "@/lib/chemistry/ph-for-co2"
import { sensitivities } from "@/lib/chemistry/uncertainty"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { waterQuantities } from "@/lib/units/quantities-water"

type Name = keyof typeof waterQuantities

/** Any value of a quantity, its two ends included. */
const any = (name: Name) => {
  const { min, max } = waterQuantities[name]
  return fc.oneof(fc.constantFrom(min, max), fc.double({ min, max, noNaN: true }))
}
const all = <N extends Name>(...names: N[]): fc.Arbitrary<Record<N, number>> =>
  fc
    .tuple(...names.map(any))
    .map((values) => Object.fromEntries(names.map((name, i) => [name, values[i]])) as Record<N, number>)
const maybe = (name: Name) => fc.option(any(name), { nil: undefined, freq: 2 })

const water = fc
  .tuple(
    all("temperature_c", "air_co2_ppm", "altitude_m", "temperature_error_c"),
    fc.record({
      ionic_strength_mol_l: maybe("ionic_strength_mol_l"),
      conductivity_us_cm: maybe("conductivity_us_cm"),
      tds_mg_l: maybe("tds_mg_l"),
      tds_factor: maybe("tds_factor"),
      gh_dgh: maybe("gh_dgh"),
      phosphate_mg_l: maybe("phosphate_mg_l"),
      doc_mg_l: maybe("doc_mg_l"),
    }),
  )
  .map(([given, optional]) => ({ ...given, ...optional }))

const with_ = <T extends object>(rest: fc.Arbitrary<T>) =>
  fc.tuple(water, rest).map(([w, r]) => ({ ...w, ...r }))

const questions = {
  co2FromPh: [co2FromPh, with_(all("ph", "kh_dkh", "ph_error", "kh_error_dkh"))],
  phForCo2: [phForCo2, with_(all("co2_mg_l", "kh_dkh", "ph_error", "kh_error_dkh"))],
  khFromCo2: [khFromCo2, with_(all("co2_mg_l", "ph", "ph_error"))],
  co2FromPhDrop: [
    co2FromPhDrop,
    with_(
      fc
        .tuple(
          all("tank_ph", "baseline_co2_mg_l", "ph_drop_error", "air_co2_error_ppm"),
          fc.record({
            degassed_ph: any("ph"),
            kh_dkh: maybe("kh_dkh"),
            baseline: fc.constantFrom(...baselines),
          }),
        )
        .map(([a, b]) => ({ ...a, ...b })),
    ),
  ],
  co2FromDropChecker: [
    co2FromDropChecker,
    fc
      .tuple(
        all("reference_kh_dkh", "temperature_c", "temperature_error_c"),
        fc.oneof(
          fc.record({ indicator_ph: any("indicator_ph") }),
          fc.record({ indicator_colour: fc.constantFrom(...colourBands.map((band) => band.colour)) }),
        ),
        fc.record({ indicator_ph_error: any("ph_error") }),
      )
      .map(([a, b, c]) => ({ ...a, ...b, ...c })),
  ],
  co2Grid: [
    co2Grid,
    with_(
      fc
        .tuple(
          all("ph_from", "ph_to", "kh_from_dkh", "kh_to_dkh", "ph_error", "kh_error_dkh"),
          any("ph_step"),
        )
        .map(([a, step]) => ({ ...a, ph_step: step + 0.2, kh_step_dkh: 5 })),
    ),
  ],
  // biome-ignore lint/suspicious/noExplicitAny: each question has its own input.
} as const satisfies Record<string, readonly [(input: any) => Answer<object, object>, fc.Arbitrary<object>]>

describe.each(Object.entries(questions))("%s, on any input within its bounds", (_, [ask, input]) => {
  it("answers with finite numbers in order, or refuses and names a field of the input", () => {
    let answered = 0
    fc.assert(
      fc.property(input as fc.Arbitrary<object>, (given) => {
        let answer: Answer<object, object>
        try {
          answer = (ask as (input: object) => Answer<object, object>)(given)
        } catch (error) {
          expect(error).toBeInstanceOf(OutOfDomain)
          const { field, detail } = error as OutOfDomain
          expect(Object.keys(given)).toContain(field)
          expect(detail.length).toBeGreaterThan(20)
          return
        }
        answered++
        everyNumber(answer, (value, path) => expect(Number.isFinite(value), path).toBe(true))
        expect(JSON.stringify(answer)).not.toMatch(/NaN|Infinity|undefined/)
        inOrder(answer.result as Record<string, number>)
        withinBounds(answer.result)
      }),
      { numRuns: 2000 },
    )
    expect(answered).toBeGreaterThan(30)
  })
})

describe("sensitivities", () => {
  it("are the derivatives of ln CO2 by pH, KH and temperature", () => {
    const tank = fc.record({
      temperature_c: fc.double({ min: 5, max: 40, noNaN: true }),
      ph: fc.double({ min: 5.5, max: 8, noNaN: true }),
      kh_dkh: fc.double({ min: 1, max: 20, noNaN: true }),
      phosphate_mg_l: fc.double({ min: 0, max: 5, noNaN: true }),
    })
    fc.assert(
      fc.property(tank, ({ temperature_c, ph, kh_dkh, phosphate_mg_l }) => {
        const at = (t: number) =>
          carbonateSystem({ temperature_c: t, ionic_strength_mol_l: 0.003, phosphate_mg_l })
        const ln = (p: number, kh: number, t: number) => Math.log(co2AtPh(at(t), { ph: p, kh_dkh: kh }))
        fc.pre(speciesFit(() => ln(ph, kh_dkh, temperature_c)))
        const slope = sensitivities(
          at(temperature_c),
          { ph, kh_dkh },
          speciesAtPh(at(temperature_c), { ph, kh_dkh }),
        )
        const e = 1e-5
        const derivative = (f: (d: number) => number) => (f(e) - f(-e)) / (2 * e)
        expect(slope.ph).toBeCloseTo(
          derivative((d) => ln(ph + d, kh_dkh, temperature_c)),
          5,
        )
        expect(slope.kh).toBeCloseTo(
          derivative((d) => ln(ph, kh_dkh * (1 + d), temperature_c)),
          5,
        )
        // K1 alone is followed with temperature; the rest moves it by less than 0.3 % a degree.
        const byTemperature = derivative((d) => ln(ph, kh_dkh, temperature_c + d))
        expect(Math.abs(slope.temperature - byTemperature)).toBeLessThan(0.003)
      }),
    )
  })

  it.each([
    [10, -2.24],
    [20, -1.54],
    [25, -1.23],
    [30, -0.96],
    [35, -0.7],
  ])("at %d °C is %d % a kelvin, the slope of the published K1", (temperature_c, expected) => {
    const system = carbonateSystem({ temperature_c, ionic_strength_mol_l: 0.003 })
    const at = { ph: 6.8, kh_dkh: 4 }
    const slope = sensitivities(system, at, speciesAtPh(system, at))
    expect((slope.temperature * 100).toFixed(2)).toBe(expected.toFixed(2))
  })
})

function speciesFit(run: () => number): boolean {
  try {
    return Number.isFinite(run())
  } catch {
    return false
  }
}

function everyNumber(value: unknown, check: (value: number, path: string) => void, path = "answer"): void {
  if (typeof value === "number") check(value, path)
  else if (typeof value === "object" && value !== null) {
    for (const [name, inner] of Object.entries(value)) everyNumber(inner, check, `${path}.${name}`)
  }
}

function inOrder(result: Record<string, number>): void {
  for (const [low, middle, high] of [
    ["co2_low_mg_l", "co2_mg_l", "co2_high_mg_l"],
    ["ph_low", "ph", "ph_high"],
    ["kh_low_dkh", "kh_dkh", "kh_high_dkh"],
  ] as const) {
    if (result[low] === undefined || result[middle] === undefined) continue
    expect(result[low]).toBeLessThanOrEqual(result[middle])
    expect(result[middle]).toBeLessThanOrEqual(result[high]!)
  }
}

/** Results lie within the bounds that the table of quantities publishes for them, up to rounding. */
function withinBounds(result: object): void {
  for (const [name, value] of Object.entries(result)) {
    const quantity = waterQuantities[name as Name]
    if (quantity === undefined || typeof value !== "number") continue
    // What a small or exact reading yields may be less than anybody would enter.
    if (/_(low|high)|method_ratio|^co2_mg_l$/.test(name)) continue
    expect(value, name).toBeGreaterThanOrEqual(quantity.min - 1e-9)
    expect(value, name).toBeLessThanOrEqual(quantity.max + 1e-9)
  }
}
