import { checkBounds } from "@/lib/units/bounds"
import { CO2_MG_PER_MOL } from "@/lib/units/chemistry"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { waterQuantities } from "@/lib/units/quantities-water"
import { type Answer, type Caution, method } from "./answer"
import { carbonateSystem, speciesAtPh } from "./carbonate"
import { livestockCautions } from "./carbonate-cautions"
import { type ColourBand, colourBands } from "./colour-bands"
import { ionicStrengthOfReference } from "./ionic-strength"
import { type Co2Level, co2Level } from "./level"
import { type Co2Interval, co2Interval, type LogNormal, logNormal, sensitivities } from "./uncertainty"

export const dropCheckerDefaults = {
  reference_kh_dkh: 4,
  temperature_c: 25,
  temperature_error_c: 0.5,
  /** Reading a colour by eye, with the dye's own spread of 0.1 to 0.2. Common practice, no source. */
  indicator_ph_error: 0.15,
} as const

/** One of `indicator_ph` and `indicator_colour`. */
export interface DropCheckerInput {
  readonly reference_kh_dkh: number
  readonly indicator_ph?: number | undefined
  readonly indicator_colour?: string | undefined
  readonly indicator_ph_error: number
  readonly temperature_c: number
  readonly temperature_error_c: number
}

export interface DropCheckerResult extends Co2Interval {
  readonly co2_mg_l: number
  readonly level: Co2Level
  /** What the colour was read as. */
  readonly indicator_ph: number
  readonly pco2_uatm: number
}

/**
 * CO2 of the tank from the colour of a drop checker: a solution of known KH that trades CO2 with the tank through
 * air alone. Both then stand under the same pressure of CO2, and at one temperature hold the same mg/L within 0.2 %,
 * whatever the tank's KH, phosphate or tannins.
 *
 * Equations, sources and accuracy: `carbonateSystem`. Throws `OutOfDomain` on the field to change.
 */
export function co2FromDropChecker(
  input: DropCheckerInput,
  bands: readonly ColourBand[] = colourBands,
): Answer<DropCheckerResult, LogNormal<"indicator" | "temperature" | "model">> {
  checkBounds(input, waterQuantities)
  const { reference_kh_dkh: kh_dkh, temperature_c } = input
  const { ph, error, band } = reading(input, bands)
  const system = carbonateSystem({ temperature_c, ionic_strength_mol_l: ionicStrengthOfReference(kh_dkh) })
  const fields = { ph: band ? "indicator_colour" : "indicator_ph", kh_dkh: "reference_kh_dkh" }
  const species = withFields(fields, () => speciesAtPh(system, { ph, kh_dkh }))
  const co2_mg_l = species.co2 * CO2_MG_PER_MOL
  const pco2_uatm = species.pco2_atm * 1e6
  const slope = sensitivities(system, { ph, kh_dkh }, species)
  const spread = logNormal({
    indicator: Math.abs(slope.ph) * error,
    temperature: Math.abs(slope.temperature) * input.temperature_error_c,
    model: 0.01,
  })
  const interval = co2Interval(system, co2_mg_l, spread.sigma_ln)
  return {
    result: { co2_mg_l, ...interval, level: co2Level(interval.co2_high_mg_l), indicator_ph: ph, pco2_uatm },
    uncertainty: spread,
    cautions: [...livestockCautions(system, interval), lag, ...(band?.open ? [endOfScale(band)] : [])],
    assumptions: [
      {
        code: "reference_solution",
        message: `The drop checker holds ${kh_dkh} dKH of sodium bicarbonate in demineralised water, not tank water, and has the tank's temperature.`,
      },
      {
        code: "equilibrium",
        message: "The tank has held this CO2 for some hours, so that the drop checker has caught up.",
      },
    ],
    method: method("CO2 from a drop checker", [
      "plummerBusenberg1982",
      "millero1995",
      "truesdellJones1974",
      "bradleyPitzer1979",
      "kell1975",
      "crcIndicators2016",
      "crank1975",
      "wedemeyer1996",
      "treanor2020",
    ]),
  }
}

/** The pH that was read, its standard error, and the band when it was read as a colour. */
function reading(
  { indicator_ph, indicator_colour, indicator_ph_error }: DropCheckerInput,
  bands: readonly ColourBand[],
): { ph: number; error: number; band?: ColourBand } {
  if ((indicator_ph === undefined) === (indicator_colour === undefined)) {
    throw new OutOfDomain("indicator_ph", "Give either indicator_ph or indicator_colour.")
  }
  if (indicator_ph !== undefined) return { ph: indicator_ph, error: indicator_ph_error }
  const band = bands.find(({ colour }) => colour === indicator_colour)
  if (!band) {
    const known = bands.map(({ colour }) => colour).join(", ")
    throw new OutOfDomain("indicator_colour", `Choose one of ${known}.`)
  }
  // Anywhere in the band is as likely, a rectangular error; a narrow band reads no better than an eye does.
  const width = (band.ph_to - band.ph_from) / 2 / Math.sqrt(3)
  return { ph: (band.ph_from + band.ph_to) / 2, error: Math.max(indicator_ph_error, width), band }
}

/**
 * @source crank1975, chapter 4: slowest mode of a layer with one open face, 4 h²/(π² D); 3.8 h for 8 mm of liquid with
 * D 1.92e-9 m²/s (parkhurstAppelo2013).
 */
const lag: Caution = {
  code: "drop_checker_lag",
  severity: "warning",
  message:
    "A drop checker shows the average of the last one to several hours (about 4 h for 8 mm of liquid). Never use it as an alarm: watch the fish.",
}

function endOfScale({ colour, open, ph_from, ph_to }: ColourBand): Caution {
  const below = open === "below"
  const name = colour.replaceAll("_", " ")
  return {
    code: "end_of_scale",
    severity: below ? "danger" : "info",
    message: below
      ? `The colour ${name} is the end of the scale (pH ${ph_to} and below): the CO2 may be any amount above that. Give less gas now and read again in a few hours.`
      : `The colour ${name} is the end of the scale (pH ${ph_from} and above): the CO2 may be any smaller amount, down to that of the air.`,
  }
}
