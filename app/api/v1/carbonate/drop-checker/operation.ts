import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { co2FromDropChecker, dropCheckerDefaults } from "@/lib/chemistry/co2-from-drop-checker"
import { colourBands } from "@/lib/chemistry/colour-bands"
import { level, logNormalUncertainty } from "../water-fields"

const colours = colourBands.map(({ colour }) => colour) as [string, ...string[]]

export const carbonateDropChecker = defineCalculation({
  id: "carbonateDropChecker",
  path: "/carbonate/drop-checker",
  tag: "Carbonate",
  summary: "CO2 level from a drop checker's pH or colour",
  description: "Send either `indicator_ph` or `indicator_colour`.",
  units: 1,
  request: z.strictObject({
    reference_kh_dkh: quantity("reference_kh_dkh").default(dropCheckerDefaults.reference_kh_dkh),
    indicator_ph: quantity("indicator_ph").optional(),
    indicator_colour: z
      .enum(colours)
      .optional()
      .meta({ description: "Colour of the bromothymol blue solution; the list may grow" }),
    indicator_ph_error: quantity("indicator_ph_error").default(dropCheckerDefaults.indicator_ph_error),
    temperature_c: quantity("temperature_c").default(dropCheckerDefaults.temperature_c),
    temperature_error_c: quantity("temperature_error_c").default(dropCheckerDefaults.temperature_error_c),
  }),
  result: {
    co2_mg_l: figure("co2_mg_l"),
    co2_low_mg_l: figure("co2_low_mg_l"),
    co2_high_mg_l: figure("co2_high_mg_l"),
    level,
    indicator_ph: figure("indicator_ph"),
    pco2_uatm: figure("pco2_uatm"),
  },
  uncertainty: logNormalUncertainty("indicator", "temperature", "model"),
  example: { indicator_colour: "green" },
  run: (input) => co2FromDropChecker(input),
})
