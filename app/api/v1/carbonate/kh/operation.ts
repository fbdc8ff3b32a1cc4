import { z } from "zod"
import { defineCalculation } from "@/lib/api/define-calculation"
import { figure, quantity } from "@/lib/api/quantity"
import { khFromCo2 } from "@/lib/chemistry/kh-from-co2"
import { ionicStrengthResult, logNormalUncertainty, phError, waterFields } from "../water-fields"

export const carbonateKh = defineCalculation({
  id: "carbonateKh",
  path: "/carbonate/kh",
  tag: "Carbonate",
  summary: "Carbonate hardness from CO2 and pH",
  units: 1,
  request: z.strictObject({
    co2_mg_l: quantity("co2_mg_l"),
    ph: quantity("ph"),
    ...waterFields,
    ...phError,
  }),
  result: {
    kh_dkh: figure("kh_dkh"),
    kh_low_dkh: figure("kh_low_dkh"),
    kh_high_dkh: figure("kh_high_dkh"),
    ...ionicStrengthResult,
  },
  uncertainty: logNormalUncertainty("ph", "temperature", "model"),
  example: { co2_mg_l: 21, ph: 6.8 },
  run: khFromCo2,
})
