import { describe, expect, it } from "vitest"
import { figures, roundSignificant } from "@/lib/units/figures"
import { type Reading, unitFor, written, writtenRange } from "@/lib/units/format"

const metric: Reading = { locale: "en", system: "metric" }
const us: Reading = { locale: "en-US", system: "us", kh: "kh_ppm_caco3" }
const german: Reading = { locale: "de", system: "metric" }

describe("a number for a person", () => {
  it("shows two significant digits unless asked for more, with the unit beside it", () => {
    expect(written(21.4433, "mg/L", metric)).toEqual({ figure: "21", unit: "mg/L" })
    expect(written(21.4433, "mg/L", metric, 3)).toEqual({ figure: "21.4", unit: "mg/L" })
    expect(written(567.65, "L/h", metric, 3)).toEqual({ figure: "568", unit: "L/h" })
  })

  it("shows a pH with two decimals and no unit", () => {
    expect(written(6.7, "pH", metric)).toEqual({ figure: "6.70", unit: "" })
  })

  it("converts to the person's units, and hardness apart from them", () => {
    expect(written(25, "°C", us)).toEqual({ figure: "77", unit: "°F" })
    expect(written(180, "L", us)).toEqual({ figure: "48", unit: "gal" })
    expect(written(4, "dKH", us)).toEqual({ figure: "71", unit: "ppm CaCO3" })
    expect(written(4, "dKH", metric)).toEqual({ figure: "4", unit: "dKH" })
    expect(written(8, "dGH", us)).toEqual({ figure: "8", unit: "dGH" })
  })

  it("writes as the locale does", () => {
    expect(written(0.615, "mg/L", german, 3).figure).toBe("0,615")
    expect(written(20100, "µatm", german, 3).figure).toBe("20.100")
  })

  it("writes an interval as one range, ends converted", () => {
    expect(writtenRange(12.815, 35.88, "mg/L", metric)).toEqual({ figure: "13–36", unit: "mg/L" })
    expect(writtenRange(20, 30, "°C", us)).toEqual({ figure: "68–86", unit: "°F" })
    expect(writtenRange(6.42, 6.87, "pH", german).figure).toBe("6,42–6,87")
  })

  it("leaves a unit that a system does not name as it is", () => {
    expect(unitFor("mmol/L", us)).toBeUndefined()
    expect(written(1.43, "mmol/L", us)).toEqual({ figure: "1.4", unit: "mmol/L" })
  })
})

describe("rounding to significant digits", () => {
  it("keeps six by default and never turns into an exponent's text", () => {
    expect(roundSignificant(21.443331839984438)).toBe(21.4433)
    expect(roundSignificant(0.000477698123)).toBe(0.000477698)
    expect(roundSignificant(1234567.8)).toBe(1234570)
    expect(roundSignificant(0)).toBe(0)
    expect(roundSignificant(-0.0123456789, 3)).toBe(-0.0123)
  })

  it.each([
    [567.65, 3, "568"],
    [0.0456, 2, "0.046"],
    [24037.4, 2, "24000"],
    [3, 2, "3"],
    [0.00000123456, 3, "0.00000123"],
    [0, 2, "0"],
  ])("writes %d to %i digits as %s in a sentence", (value, digits, expected) => {
    expect(figures(value, digits)).toBe(expected)
  })
})
