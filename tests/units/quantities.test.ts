import { readdirSync } from "node:fs"
import { join } from "node:path"
import { describe, expect, it } from "vitest"
import { checkBounds } from "@/lib/units/bounds"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import { waterQuantities } from "@/lib/units/quantities-water"

/** The unit that a name's ending stands for. */
const endings: readonly [RegExp, string][] = [
  [/_mg_l$/, "mg/L"],
  [/_mmol_l$/, "mmol/L"],
  [/_mol_l$/, "mol/L"],
  [/_dkh$/, "dKH"],
  [/_dgh$/, "dGH"],
  [/_c$/, "°C"],
  [/_ppm$/, "ppm"],
  [/_uatm$/, "µatm"],
  [/_us_cm$/, "µS/cm"],
  [/_m2$/, "m²"],
  [/_cm$/, "cm"],
  [/_l$/, "L"],
  [/(^|_)ph(_|$)/, "pH"],
]

describe("quantities", () => {
  it("names each once over all rooms, and leaves no room out", async () => {
    const folder = join(import.meta.dirname, "../../lib/units")
    const files = readdirSync(folder).filter((name) => name.startsWith("quantities-"))
    const tables = await Promise.all(files.map((file) => import(join(folder, file))))
    const all = tables
      .flatMap((table) => Object.values(table))
      .flatMap((table) => Object.keys(table as object))
    expect(files.length).toBeGreaterThanOrEqual(3)
    expect(all.filter((name, i) => all.indexOf(name) !== i)).toEqual([])
    expect(all.sort()).toEqual(Object.keys(quantities).sort())
  })

  it("has the unit that the name ends in, for all of the water's", () => {
    for (const [name, { unit }] of Object.entries(waterQuantities)) {
      const ending = endings.find(([pattern]) => pattern.test(name))
      if (ending) expect(unit, name).toBe(ending[1])
    }
  })

  it("has bounds in order, a description and a UCUM code for every one", () => {
    for (const [name, { min, max, description, ucum }] of Object.entries(quantities)) {
      expect(min, name).toBeLessThan(max)
      expect(description.length, name).toBeGreaterThan(3)
      expect(ucum, name).toMatch(/^\S+$/)
    }
  })

  it("has every name of the carbonate questions in the API's contract", () => {
    const names = [
      "ph kh_dkh temperature_c ionic_strength_mol_l conductivity_us_cm tds_mg_l gh_dgh phosphate_mg_l air_co2_ppm",
      "ph_error kh_error_dkh temperature_error_c co2_mg_l co2_low_mg_l co2_high_mg_l hco3_mmol_l co3_mmol_l",
      "dic_mmol_l pco2_uatm saturation_ratio degassed_ph ph_low ph_high ph_drop kh_low_dkh kh_high_dkh tank_ph",
      "reference_kh_dkh indicator_ph ph_from ph_to ph_step kh_from_dkh kh_to_dkh kh_step_dkh",
    ].flatMap((line) => line.split(" "))
    expect(names.filter((name) => !(name in quantities))).toEqual([])
  })
})

describe("bounds", () => {
  it("accepts both ends and refuses what lies beyond, naming the field and the limits", () => {
    expect(() => checkBounds({ ph: 4, kh_dkh: 30 }, waterQuantities)).not.toThrow()
    expect(() => checkBounds({ ph: 3.999 }, waterQuantities)).toThrow("ph: Enter 4 to 9.5; you gave 3.999.")
    expect(() => checkBounds({ temperature_c: 51 }, waterQuantities)).toThrow(
      "Enter 0 to 50 °C; you gave 51.",
    )
    expect(() => checkBounds({ ph: Number.NaN }, waterQuantities)).toThrow("you gave no number")
  })

  it("passes over absent fields and names that are no quantity", () => {
    expect(() => checkBounds({ ph: undefined, colour: "green", other: 1e9 }, waterQuantities)).not.toThrow()
  })
})

describe("withFields", () => {
  it("reports a refusal under the name that the person used, and leaves other errors alone", () => {
    const fail = (error: Error) => () =>
      withFields({ ph: "tank_ph" }, () => {
        throw error
      })
    expect(fail(new OutOfDomain("ph", "too low"))).toThrow("tank_ph: too low")
    expect(fail(new OutOfDomain("kh_dkh", "too low"))).toThrow("kh_dkh: too low")
    expect(fail(new RangeError("other"))).toThrow(RangeError)
    expect(withFields({}, () => 7)).toBe(7)
  })
})
