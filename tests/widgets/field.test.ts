import fc from "fast-check"
import { describe, expect, it } from "vitest"
import { fieldOf, shownValue, slid, symbolOf, typed } from "@/widgets/shared/field"
import { numberWriter } from "@/widgets/shared/locale"
import { waterFields } from "@/widgets/shared/water-fields"

const write = numberWriter({ language: "en", tag: "en" })
const { kh_dkh, temperature_c, ph } = waterFields

describe("a field", () => {
  it("keeps the last value that could be used while it holds something else", () => {
    const field = fieldOf(ph, 6.8, null, write)
    expect(typed(ph, field, "")).toMatchObject({ text: "", value: 6.8, problem: "empty" })
    expect(typed(ph, field, "6.x")).toMatchObject({ text: "6.x", value: 6.8, problem: "not_a_number" })
    expect(typed(ph, field, "3.9")).toMatchObject({ value: 6.8, problem: "too_low" })
    expect(typed(ph, field, "9.6")).toMatchObject({ value: 6.8, problem: "too_high" })
    expect(typed(ph, field, "7,1")).toMatchObject({ text: "7,1", value: 7.1, problem: null })
  })

  it("takes a bound of the quantity as it is shown in each unit", () => {
    for (const kind of Object.values(waterFields)) {
      for (const unit of kind.units) {
        for (const bound of [kind.min, kind.max]) {
          const field = fieldOf(kind, kind.min, unit.id, write)
          const shown = write(shownValue(bound, unit), unit.decimals)
          const taken = typed(kind, field, shown)
          expect(taken.problem, `${shown} ${symbolOf(unit)}`).toBeNull()
          expect(taken.value).toBeGreaterThanOrEqual(kind.min)
          expect(taken.value).toBeLessThanOrEqual(kind.max)
        }
      }
    }
  })

  // 1 dKH = 17.84796 mg/L CaCO3 = 0.3566525 meq/L: CHEMISTRY 3, from the definition 10 mg/L CaO.
  it("means the same water in each unit", () => {
    const ppm = typed(kh_dkh, fieldOf(kh_dkh, 4, "kh_ppm_caco3", write), "17.84796")
    expect(ppm.value).toBeCloseTo(1, 4)
    const meq = typed(kh_dkh, fieldOf(kh_dkh, 4, "kh_meq_l", write), "0.3566525")
    expect(meq.value).toBeCloseTo(1, 6)
    const fahrenheit = typed(temperature_c, fieldOf(temperature_c, 20, "f", write), "77")
    expect(fahrenheit.value).toBeCloseTo(25, 12)
  })

  it("changes its unit without changing its value, there and back", () => {
    fc.assert(
      fc.property(fc.double({ min: kh_dkh.min, max: kh_dkh.max, noNaN: true }), (value) => {
        const there = fieldOf(kh_dkh, fieldOf(kh_dkh, value, "dkh", write).value, "kh_ppm_caco3", write)
        expect(fieldOf(kh_dkh, there.value, "dkh", write).value).toBe(value)
      }),
    )
  })

  it("is written as the locale writes numbers", () => {
    const german = numberWriter({ language: "de", tag: "de" })
    expect(slid(ph, fieldOf(ph, 6.8, null, german), 6.85, german)).toMatchObject({
      text: "6,85",
      value: 6.85,
    })
  })

  it("falls back to its first unit for a unit that it does not know", () => {
    expect(fieldOf(kh_dkh, 4, "ounces", write).unit.id).toBe("dkh")
  })
})
