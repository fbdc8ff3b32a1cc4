import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import {
  ionicStrengthResult,
  khError,
  level,
  logNormalUncertainty,
  phError,
  waterFields,
} from "../water-fields"

export const carbonateCo2 = defineCalculation({
  id: "carbonateCo2",
  path: "/carbonate/co2",
  tag: "Carbonate",
  summary: "CO2 level from pH and carbonate hardness",
  units: 1,
  request: z.strictObject({
    ph: quantity("ph"),
    kh_dkh: quantity("kh_dkh"),
    ...waterFields,
    ...phError,
    ...khError,
  }),
  result: {
    co2_mg_l: figure("co2_mg_l"),
    co2_low_mg_l: figure("co2_low_mg_l"),
    co2_high_mg_l: figure("co2_high_mg_l"),
    level,
    hco3_mmol_l: figure("hco3_mmol_l"),
    co3_mmol_l: figure("co3_mmol_l"),
    dic_mmol_l: figure("dic_mmol_l"),
    pco2_uatm: figure("pco2_uatm"),
    saturation_ratio: figure("saturation_ratio"),
    degassed_ph: figure("degassed_ph"),
    ...ionicStrengthResult,
  },
  uncertainty: {
    ...logNormalUncertainty("ph", "kh", "temperature", "model"),
    co2_low_68_mg_l: figure("co2_low_68_mg_l"),
    co2_high_68_mg_l: figure("co2_high_68_mg_l"),
  },
  example: { ph: 6.8, kh_dkh: 4 },
  run: co2FromPh,
})
