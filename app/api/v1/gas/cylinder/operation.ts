import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, figureOrNull, quantity } from "@/lib/api/quantity"
import { cylinderLife } from "@/lib/gas/cylinder-life"
import { gasDefaults } from "@/lib/gas/defaults"

const cylinder = {
  name: z.string().max(120).optional(),
  remaining_g: quantity("remaining_g").optional(),
  fill_ratio_kg_l: quantity("fill_ratio_kg_l").optional(),
  test_pressure_bar: quantity("test_pressure_bar").optional(),
  price: quantity("price").optional(),
  refill_price: quantity("refill_price").optional(),
}

const life = {
  name: z.union([z.string(), z.null()]),
  cylinder_mass_g: figure("cylinder_mass_g"),
  days: figure("days"),
  days_low: figure("days"),
  days_high: figure("days"),
  refills_per_year: figure("refills_per_year"),
  cost_per_month: figureOrNull("cost_per_month"),
  first_year_cost: figureOrNull("first_year_cost"),
  usable_g: figure("usable_g"),
  days_left: figure("days"),
  pressure_bar_abs: figure("pressure_bar_abs"),
  phase: z.enum(["two_phase", "liquid_full", "gas", "supercritical"]),
  liquid_present: z.boolean(),
  fill_ratio_kg_l: figure("fill_ratio_kg_l"),
  max_fill_ratio_kg_l: figure("max_fill_ratio_kg_l"),
  fill_ratio_ok: z.boolean(),
  liquid_full_c: figureOrNull("liquid_full_c"),
  water_capacity_l: figure("water_capacity_l"),
  residual_g: figure("residual_g"),
  liquid_gone_g: figureOrNull("liquid_gone_g"),
}

export const gasCylinder = defineCalculation({
  id: "gasCylinder",
  path: "/gas/cylinder",
  tag: "Gas",
  summary: "How long a cylinder lasts and what it costs",

  units: 1,
  request: z.strictObject({
    daily_use_g_day: quantity("daily_use_g_day"),
    cylinder_mass_g: quantity("cylinder_mass_g").optional(),
    ...cylinder,
    cylinders: z
      .array(z.strictObject({ cylinder_mass_g: quantity("cylinder_mass_g"), ...cylinder }))
      .min(1)
      .max(20)
      .optional()
      .meta({ description: "Several to compare, in place of `cylinder_mass_g`" }),
    usable_fraction: quantity("usable_fraction").default(gasDefaults.usable_fraction),
    ambient_c: quantity("ambient_c").default(gasDefaults.ambient_c),
    cut_off_bar_abs: quantity("cut_off_bar_abs").default(gasDefaults.cut_off_bar_abs),
  }),
  result: {
    ...life,
    cylinders: z.array(z.object(life)),
  },
  uncertainty: { days_low: figure("days"), days_high: figure("days") },
  example: { daily_use_g_day: 11, cylinder_mass_g: 2000, refill_price: 28 },
  run: cylinderLife,
})
