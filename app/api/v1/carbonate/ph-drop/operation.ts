import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { baselines, co2FromPhDrop, phDropDefaults } from "@/lib/chemistry/co2-from-ph-drop"
import { ionicStrengthResult, level, logNormalUncertainty, waterFields } from "../water-fields"

export const carbonatePhDrop = defineCalculation({
  id: "carbonatePhDrop",
  path: "/carbonate/ph-drop",
  tag: "Carbonate",
  summary: "CO2 level from how far the gas lowers the pH",
  units: 1,
  request: z.strictObject({
    tank_ph: quantity("tank_ph"),
    degassed_ph: quantity("degassed_ph"),
    baseline: z.enum(baselines).default(phDropDefaults.baseline).meta({
      description: "Water that `degassed_ph` was read in: aerated to the end, or the tank before the gas",
    }),
    baseline_co2_mg_l: quantity("baseline_co2_mg_l").default(phDropDefaults.baseline_co2_mg_l),
    kh_dkh: quantity("kh_dkh").optional(),
    ph_drop_error: quantity("ph_drop_error").default(phDropDefaults.ph_drop_error),
    air_co2_error_ppm: quantity("air_co2_error_ppm").default(phDropDefaults.air_co2_error_ppm),
    ...waterFields,
  }),
  result: {
    co2_mg_l: figure("co2_mg_l"),
    co2_low_mg_l: figure("co2_low_mg_l"),
    co2_high_mg_l: figure("co2_high_mg_l"),
    level,
    ph_drop: figure("ph_drop"),
    baseline_co2_mg_l: figure("baseline_co2_mg_l"),
    pco2_uatm: figure("pco2_uatm"),
    kh_method_co2_mg_l: figure("kh_method_co2_mg_l").optional(),
    method_ratio: figure("method_ratio").optional(),
    ...ionicStrengthResult,
  },
  uncertainty: logNormalUncertainty("ph_drop", "baseline", "temperature", "model"),
  example: { tank_ph: 6.65, degassed_ph: 8.3, kh_dkh: 4 },
  run: co2FromPhDrop,
})
