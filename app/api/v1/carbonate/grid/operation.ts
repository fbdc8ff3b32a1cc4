import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { co2Grid } from "@/lib/chemistry/co2-grid"
import { khError, level, phError, waterFields } from "../water-fields"

export const carbonateGrid = defineCalculation({
  id: "carbonateGrid",
  path: "/carbonate/grid",
  tag: "Carbonate",
  summary: "CO2 over a field of pH and carbonate hardness",
  description: "At most 2,500 cells.",
  units: 2,
  request: z.strictObject({
    ph_from: quantity("ph_from"),
    ph_to: quantity("ph_to"),
    ph_step: quantity("ph_step"),
    kh_from_dkh: quantity("kh_from_dkh"),
    kh_to_dkh: quantity("kh_to_dkh"),
    kh_step_dkh: quantity("kh_step_dkh"),
    ...waterFields,
    ...phError,
    ...khError,
  }),
  result: {
    rows: z.array(
      z.object({
        kh_dkh: figure("kh_dkh"),
        cells: z.array(z.object({ ph: figure("ph"), co2_mg_l: figure("co2_mg_l"), level })),
      }),
    ),
  },
  uncertainty: {},
  example: { ph_from: 6.4, ph_to: 7.2, ph_step: 0.4, kh_from_dkh: 2, kh_to_dkh: 6, kh_step_dkh: 2 },
  run: co2Grid,
})
