import { PO4_MG_PER_MOL } from "@/lib/units/chemistry"
import { figures } from "@/lib/units/figures"
import type { Caution } from "./answer"
import { type CarbonateSystem, phosphateAlkalinity, type Species } from "./carbonate"
import { degassedPh } from "./carbonate-water"
import type { PhDropInput } from "./co2-from-ph-drop"

interface Drop {
  readonly input: PhDropInput
  readonly kh_dkh: number
  readonly system: CarbonateSystem
  readonly co2_mg_l: number
  readonly baseline_co2_mg_l: number
  readonly tank: Species
  readonly degassed: Species
  readonly kh_method_co2_mg_l?: number
  readonly method_ratio?: number
}

/** A ratio of the two methods beyond which one of the readings is wrong. */
const METHODS_AGREE_WITHIN = 1.3

/** What weakens an answer from the pH drop, with its size for these readings. */
export function phDropCautions(drop: Drop): Caution[] {
  return [baseline(drop), onePhRule(drop), noDrop(drop), methodsDisagree(drop), buffers(drop)].filter(
    (caution) => caution !== undefined,
  )
}

function baseline({ input, co2_mg_l, baseline_co2_mg_l }: Drop): Caution {
  if (input.baseline === "aerated_sample") {
    const crowded = (co2_mg_l * 1000) / input.air_co2_ppm
    return {
      code: "air_of_the_room",
      severity: "info",
      message: `The answer follows the air that the sample stood in. With 1,000 ppm, as in a room with people, it would be ${figures(crowded, 2)} mg/L instead of ${figures(co2_mg_l, 2)}.`,
    }
  }
  const [low, high] = [2, 4].map((co2) => figures((co2_mg_l * co2) / baseline_co2_mg_l, 2))
  return {
    code: "baseline_not_air",
    severity: "warning",
    message: `A tank before the gas goes on is not in balance with the air. If it held 2 to 4 mg/L the answer is ${low} to ${high} mg/L. A sample aerated overnight tells it better.`,
  }
}

/** The rule of the trade, "1.0 lower means 30 mg/L", against these readings. Common practice, no source. */
function onePhRule({ baseline_co2_mg_l, tank, degassed }: Drop): Caution {
  const start = baseline_co2_mg_l * (tank.hco3 / degassed.hco3)
  return {
    code: "one_ph_rule",
    severity: "info",
    message: `From this baseline a drop of 1.0 means ${figures(start * 10, 2)} mg/L, and 30 mg/L takes a drop of ${Math.log10(30 / start).toFixed(2)}. The rule "1.0 means 30 mg/L" holds only for water that starts at 3 mg/L.`,
  }
}

function noDrop({ input }: Drop): Caution | undefined {
  if (input.tank_ph < input.degassed_ph) return undefined
  return {
    code: "no_drop",
    severity: "warning",
    message: `The tank's pH (${input.tank_ph}) is not below that of the baseline water (${input.degassed_ph}): the tank holds no more CO2 than that water, or the readings are swapped.`,
  }
}

function methodsDisagree({
  input,
  kh_dkh,
  system,
  co2_mg_l,
  kh_method_co2_mg_l,
  method_ratio,
}: Drop): Caution | undefined {
  if (kh_method_co2_mg_l === undefined || method_ratio === undefined) return undefined
  if (method_ratio <= METHODS_AGREE_WITHIN && method_ratio >= 1 / METHODS_AGREE_WITHIN) return undefined
  const expected =
    input.baseline === "aerated_sample"
      ? ` Water of ${figures(kh_dkh, 3)} dKH in this air should end at pH ${degassedPh(system, { ...input, kh_dkh }).toFixed(2)}, you read ${input.degassed_ph}.`
      : ""
  const suspects =
    method_ratio > 1
      ? "other acids or buffers in the water, a KH reading that is too high, a sample not aerated to the end, or more CO2 in the air than you gave"
      : "a KH reading that is too low, or readings at different temperatures"
  return {
    code: "methods_disagree",
    severity: "warning",
    message: `pH and KH say ${figures(kh_method_co2_mg_l, 2)} mg/L, the drop says ${figures(co2_mg_l, 2)}.${expected} Suspect ${suspects}.`,
  }
}

function buffers({ input, system, tank, degassed }: Drop): Caution | undefined {
  if (input.phosphate_mg_l !== undefined) return undefined
  const buffered = { ...system, phosphate_mol_l: 5 / PO4_MG_PER_MOL }
  const carbonate = (ph: number, { carbonateAlkalinity }: Species) =>
    1 - phosphateAlkalinity(buffered, 10 ** -ph) / carbonateAlkalinity
  const inSample = carbonate(input.degassed_ph, degassed)
  // With so little KH that much phosphate cannot be in the water.
  if (inSample <= 0) return undefined
  const hidden = 1 - inSample / carbonate(input.tank_ph, tank)
  return {
    code: "buffers_read_low",
    severity: "info",
    message: `Phosphate and tannins make this method read low: 5 mg/L of phosphate that you did not enter would hide ${figures(hidden * 100, 2)} % of the CO2.`,
  }
}
