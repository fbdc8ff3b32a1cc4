import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { waterQuantities } from "@/lib/units/quantities-water"
import { type Assumption, type Method, method } from "./answer"
import { airPco2Atm, type CarbonateSystem, carbonateSystem, co2AtPressure, phAtCo2 } from "./carbonate"
import { type IonicStrength, ionicStrength, type WaterReadings } from "./ionic-strength"
import type { SourceId } from "./sources"

/** The defaults of every carbonate question, for the API, the widgets and the plan alike. */
export const carbonateDefaults = {
  temperature_c: 25,
  /** Outdoors in 2025. @source lan2025 */
  air_co2_ppm: 425,
  altitude_m: 0,
  /** A pen or probe that is calibrated now and then. Common practice, no source. */
  ph_error: 0.1,
  /** A drop test of 1 dKH a drop in 5 mL, 0.5 in 10 mL. Common practice, no source. */
  kh_error_dkh: 0.5,
  /** A glass or digital thermometer. Common practice, no source. */
  temperature_error_c: 0.5,
} as const

/** What is known of the water besides its pH and CO2: the same fields in every carbonate question. */
export interface WaterInput extends Omit<WaterReadings, "kh_dkh"> {
  readonly temperature_c: number
  readonly phosphate_mg_l?: number | undefined
  /** Dissolved organic carbon. Only cautioned about: its acids differ too much to correct for. */
  readonly doc_mg_l?: number | undefined
  readonly air_co2_ppm: number
  readonly altitude_m: number
  readonly temperature_error_c: number
}

/** The method of a carbonate answer: its name, and the sources of the equations and of the readings it used. */
export function carbonateMethod(
  name: string,
  water: WaterInput,
  { ionic_strength_source }: IonicStrength,
): Method {
  const ids: SourceId[] = [
    "plummerBusenberg1982",
    "millero1995",
    "truesdellJones1974",
    "parkhurstAppelo2013",
    "bradleyPitzer1979",
    "kell1975",
    "weissPrice1980",
  ]
  if (ionic_strength_source === "conductivity_us_cm") ids.push("marionBabcock1976")
  if (ionic_strength_source === "tds_mg_l") {
    ids.push(water.tds_factor === undefined ? "langelier1936" : "marionBabcock1976")
  }
  if (water.phosphate_mg_l) ids.push("ballNordstrom1991")
  if (water.doc_mg_l) ids.push("oliverThurmanMalcolm1983")
  ids.push("wedemeyer1996", "treanor2020")
  return method(name, ids)
}

/** The water of one question: its system, and the ionic strength with the reading it came from. */
export interface PreparedWater {
  readonly system: CarbonateSystem
  readonly ionic: IonicStrength
}

/** Checks the bounds of every field and builds the system. Throws `OutOfDomain` on the field that has to change. */
export function prepare(water: WaterInput & { readonly kh_dkh: number }): PreparedWater {
  checkBounds(water, waterQuantities)
  const ionic = ionicStrength(water)
  return { ionic, system: systemOf(water, ionic) }
}

export function systemOf(water: WaterInput, ionic: IonicStrength): CarbonateSystem {
  return carbonateSystem({
    temperature_c: water.temperature_c,
    ionic_strength_mol_l: ionic.ionic_strength_mol_l,
    phosphate_mg_l: water.phosphate_mg_l,
  })
}

/** CO2 in mg/L that the water holds in balance with the room's air. */
export function airCo2MgL(system: CarbonateSystem, water: WaterInput): number {
  return co2AtPressure(system, airPco2Atm(water))
}

/** pH of the water in balance with the room's air: what an aerated sample ends at. */
export function degassedPh(system: CarbonateSystem, water: WaterInput & { readonly kh_dkh: number }): number {
  return phAtCo2(system, { co2_mg_l: airCo2MgL(system, water), kh_dkh: water.kh_dkh })
}

/**
 * What a carbonate answer took for granted about the water, in words with its numbers. A grid spans ionic strengths
 * from `ionic` to `last`.
 */
export function waterAssumptions(water: WaterInput, ionic: IonicStrength, last = ionic): Assumption[] {
  const [from, to] = [ionic, last].map((one) => figures(one.ionic_strength_mol_l * 1000, 2))
  const strength = `${from === to ? from : `${from} to ${to}`} mmol/L`
  const assumptions: Assumption[] = [
    { code: "ionic_strength", message: ionicStrengthWords(water, ionic).replace("%", strength) },
    {
      code: "air",
      message: `Air with ${water.air_co2_ppm} ppm CO2 at ${water.altitude_m} m above the sea is what the water would degas to. Rooms with people hold 600 to 1,500 ppm.`,
    },
    {
      code: "standard_errors",
      message:
        "The errors you give are standard errors (two readings in three lie within them); the interval holds the true value 95 times in 100 if they are right.",
    },
  ]
  if (water.phosphate_mg_l === undefined) {
    assumptions.push({
      code: "no_phosphate",
      message: "No phosphate was given, so all of KH counts as carbonate hardness.",
    })
  }
  return assumptions
}

function ionicStrengthWords(water: WaterInput, { ionic_strength_source }: IonicStrength): string {
  switch (ionic_strength_source) {
    case "ionic_strength_mol_l":
      return "The ionic strength is the one you gave, %."
    case "conductivity_us_cm":
      return "The ionic strength of % comes from your conductivity, taken as referred to 25 °C."
    case "tds_mg_l":
      return water.tds_factor === undefined
        ? "The ionic strength of % comes from your TDS as weighed solids. If a meter showed it, give the meter's factor (0.5 to 0.7) as well."
        : "The ionic strength of % comes from your TDS through the meter's factor and conductivity."
    case "gh_dgh":
      return "The ionic strength of % comes from GH and KH, with 0.5 mmol/L of other salts. A tank with added salt holds more, and the answer would be up to 5 % lower."
    case "kh_dkh":
      return "The ionic strength of % is guessed from KH alone, as calcium bicarbonate water with 1 mmol/L of other salts. A conductivity reading would settle 1 to 4 % of the answer."
  }
}
