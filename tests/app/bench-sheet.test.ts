import { describe, expect, test } from "vitest"
import { plan } from "@/app/api/v1/plan/operation"
import { type BenchUnits, metricUnits } from "@/app/portal/[account]/bench/bench-units"
import { choiceOf, isChosen, type Match } from "@/app/portal/[account]/bench/catalog-choice"
import { activeFields, fieldNames, startForm } from "@/app/portal/[account]/bench/fields"
import {
  inUnits,
  isUnusable,
  readField,
  type Sheet,
  startSheet,
  withValues,
} from "@/app/portal/[account]/bench/sheet"
import { workOut } from "@/app/portal/[account]/bench/work-out"

const us: BenchUnits = { system: "us", temperature: "f", kh: "kh_ppm_caco3" }
const mixed: BenchUnits = { system: "metric", temperature: "f", kh: "kh_meq_l" }

function typed(sheet: Sheet, texts: Partial<Sheet["form"]>): Sheet {
  return { ...sheet, form: { ...sheet.form, ...texts } }
}

describe("the units of a sheet", () => {
  test.each([us, mixed])("there and back leave every field as it was: %o", (units) => {
    const sheet = typed(startSheet(metricUnits), { length_cm: "91.37", kh_dkh: "3,7", temperature_c: "24.6" })
    const back = inUnits(inUnits(sheet, units), metricUnits)
    for (const name of fieldNames) expect(readField(back, name), name).toEqual(readField(sheet, name))
  })

  test("never change the plan, whatever they round in the fields", () => {
    const sheet = typed(startSheet(metricUnits), { height_cm: "46.3", kh_dkh: "5.3" })
    const metric = workOut(sheet).worked
    const shown = inUnits(sheet, us)
    expect(shown.form.height_cm).toBe("18.23")
    expect(workOut(shown).worked?.plan).toEqual(metric?.plan)
  })

  test("read what a person types in them", () => {
    const sheet = typed(startSheet(us), { length_cm: "36", temperature_c: "77", kh_dkh: "71.392" })
    expect(readField(sheet, "length_cm")).toBeCloseTo(91.44, 10)
    expect(readField(sheet, "temperature_c")).toBeCloseTo(25, 10)
    expect(readField(sheet, "kh_dkh")).toBeCloseTo(4, 3)
  })

  test("write the points of a curve, and read them", () => {
    const points = [
      { flow_l_h: 0, head_m: 1.6 },
      { flow_l_h: 1000, head_m: 0 },
    ]
    const sheet = withValues(startSheet(us), { pump_points: points })
    expect(sheet.form.pump_points).toBe("0  5.249\n264.2  0")
    expect(readField(sheet, "pump_points")).toEqual(points)
  })

  test("leave a text that cannot be read as it stands", () => {
    const sheet = typed(startSheet(metricUnits), { length_cm: "ninety" })
    expect(inUnits(sheet, us).form.length_cm).toBe("ninety")
  })
})

describe("a sheet", () => {
  test("asks the engine what POST /api/v1/plan would be asked, filled in the same way", () => {
    const sheet = typed(startSheet(metricUnits), { kh_dkh: "6", ph: "6.9", outflow: "spray_bar" })
    const { worked } = workOut(sheet)
    expect(plan.request.parse(worked?.request)).toEqual({ ...worked?.input, use_catalog: false })
    expect(worked?.request.elements?.[0]).toEqual({ kind: "spray_bar", hole_count: 20, hole_diameter_mm: 3 })
    expect(worked?.now?.ph).toBe(6.9)
  })

  test.each([
    { texts: { length_cm: "9000" }, field: "length_cm", says: "Enter 5 to 1000 cm; you gave 9000." },
    { texts: { kh_dkh: "" }, field: "kh_dkh", says: "Write a number." },
    { texts: { lights_on_h: "25:00" }, field: "lights_on_h", says: "Enter a time of day, as 10:00." },
    { texts: { barb: "2.5" }, field: "barb", says: "Enter a whole number from 0 to 100." },
    { texts: { hardscape_l: "180" }, field: "hardscape_l", says: "only" },
    { texts: { start_ph: "6.6" }, field: "end_ph", says: "fill it in too" },
    { texts: { lift_m: "2.5" }, field: "lift_m", says: "Lower the outflow" },
    { texts: { pump_by: "curve", pump_points: "600 1.2" }, field: "pump_points", says: "at least two lines" },
    { texts: { remaining_g: "3000" }, field: "remaining_g", says: "cannot hold" },
  ] as const)("says at $field what is wrong: $says", ({ texts, field, says }) => {
    const { problems } = workOut(typed(startSheet(metricUnits), texts))
    expect(problems?.[field]).toContain(says)
  })

  test("takes no notice of fields that the choices leave out", () => {
    const sheet = typed(startSheet(metricUnits), { tank_by: "volume", length_cm: "nonsense" })
    expect(activeFields(sheet.form)).not.toContain("length_cm")
    expect(workOut(sheet).worked?.request).not.toHaveProperty("length_cm")
  })

  test("starts with a tank that works in any unit, each text readable", () => {
    for (const units of [metricUnits, us, mixed]) {
      const sheet = startSheet(units)
      expect(fieldNames.filter((name) => isUnusable(readField(sheet, name)))).toEqual(["pump_points"])
      expect(workOut(sheet).worked?.plan.result.method.name).toBe("inline_reactor")
    }
  })
})

describe("a part of the catalogue", () => {
  const item = {
    id: "item_1",
    kind: "filter",
    name: "Fernhollow canister 1000",
    sku: null,
    url: null,
    price_minor: null,
    currency: null,
    attributes: { max_flow_l_h: 1000, max_head_m: 1.6, hose_inner_diameter_mm: 16 },
    created_at: "2026-12-01T00:00:00Z",
    updated_at: "2026-12-01T00:00:00Z",
  } satisfies Match["item"]

  test("fills the fields that it speaks of, and is known again in any unit", () => {
    const choice = choiceOf(item)
    for (const units of [metricUnits, us]) {
      const sheet = withValues(startSheet(units), choice.values)
      const form = { ...sheet.form, ...choice.chosen }
      expect(isChosen(choice, units, form)).toBe(true)
      expect(isChosen(choice, units, { ...form, max_flow_l_h: "999" })).toBe(false)
      expect(workOut({ ...sheet, form }).worked?.request.pump).toEqual({
        max_flow_l_h: 1000,
        max_head_m: 1.6,
      })
    }
  })

  test("with a measured curve is planned by its curve", () => {
    const pump_curve = [
      { flow_l_h: 0, head_m: 2 },
      { flow_l_h: 1500, head_m: 0 },
    ]
    const choice = choiceOf({ ...item, attributes: { pump_curve } })
    const sheet = withValues(startSheet(metricUnits), choice.values)
    const { worked } = workOut({ ...sheet, form: { ...sheet.form, ...choice.chosen } })
    expect(worked?.request.pump).toEqual({ points: pump_curve })
  })
})

test("every option that the form starts with is one of its choice's", () => {
  expect(startForm.agitation).toBe("rippled")
  expect(workOut(startSheet(metricUnits)).problems).toBeUndefined()
})
