import { z } from "zod"
import { figure, quantity } from "@/lib/api/quantity"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"

/** What a caller may tell of the water besides pH, KH and CO2: the same in every carbonate question. */
export const waterFields = {
  temperature_c: quantity("temperature_c").default(carbonateDefaults.temperature_c),
  ionic_strength_mol_l: quantity("ionic_strength_mol_l").optional(),
  conductivity_us_cm: quantity("conductivity_us_cm").optional(),
  tds_mg_l: quantity("tds_mg_l").optional(),
  tds_factor: quantity("tds_factor").optional(),
  gh_dgh: quantity("gh_dgh").optional(),
  phosphate_mg_l: quantity("phosphate_mg_l").optional(),
  doc_mg_l: quantity("doc_mg_l").optional(),
  air_co2_ppm: quantity("air_co2_ppm").default(carbonateDefaults.air_co2_ppm),
  altitude_m: quantity("altitude_m").default(carbonateDefaults.altitude_m),
  temperature_error_c: quantity("temperature_error_c").default(carbonateDefaults.temperature_error_c),
}

export const phError = { ph_error: quantity("ph_error").default(carbonateDefaults.ph_error) }
export const khError = { kh_error_dkh: quantity("kh_error_dkh").default(carbonateDefaults.kh_error_dkh) }

/** Where the ionic strength behind an answer comes from. */
export const ionicStrengthResult = {
  ionic_strength_mol_l: figure("ionic_strength_mol_l"),
  ionic_strength_source: z
    .enum(["ionic_strength_mol_l", "conductivity_us_cm", "tds_mg_l", "gh_dgh", "kh_dkh"])
    .meta({ description: "The input that the ionic strength was found from" }),
}

export const level = z
  .enum(["low", "in_range", "high", "dangerous"])
  .meta({ id: "Co2Level", description: "How the upper end of the interval stands to livestock" })

/** Sizes of what makes the result uncertain, each as a standard error of its natural logarithm. */
export function logNormalUncertainty<Name extends string>(...names: Name[]) {
  return {
    distribution: z.literal("log-normal"),
    coverage: z.literal(0.95).meta({ "x-unit": "1" }),
    sigma_ln: figure("sigma_ln"),
    contributions: z.record(z.enum(names), figure("sigma_ln")),
  }
}
