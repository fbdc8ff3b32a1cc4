import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { phForCo2 } from "@/lib/chemistry/ph-for-co2"
import {
  ionicStrengthResult,
  khError,
  level,
  logNormalUncertainty,
  phError,
  waterFields,
} from "../water-fields"

export const carbonatePh = defineCalculation({
  id: "carbonatePh",
  path: "/carbonate/ph",
  tag: "Carbonate",
  summary: "pH set-point for a CO2 level",
  units: 1,
  request: z.strictObject({
    co2_mg_l: quantity("co2_mg_l"),
    kh_dkh: quantity("kh_dkh"),
    ...waterFields,
    ...phError,
    ...khError,
  }),
  result: {
    ph: figure("ph"),
    ph_low: figure("ph_low"),
    ph_high: figure("ph_high"),
    degassed_ph: figure("degassed_ph"),
    ph_drop: figure("ph_drop"),
    co2_low_mg_l: figure("co2_low_mg_l"),
    co2_high_mg_l: figure("co2_high_mg_l"),
    level,
    ...ionicStrengthResult,
  },
  uncertainty: {
    ...logNormalUncertainty("ph", "kh", "temperature", "model"),
    ph_sigma: figure("ph_error"),
  },
  example: { co2_mg_l: 30, kh_dkh: 4 },
  run: phForCo2,
})
