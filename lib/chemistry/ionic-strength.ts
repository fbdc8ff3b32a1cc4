import { ALKALINITY_MOL_L_PER_DKH, HARDNESS_MOL_L_PER_DGH } from "@/lib/units/chemistry"
import { OutOfDomain } from "@/lib/units/out-of-domain"

/** The readings that tell the ionic strength, best first. */
export interface WaterReadings {
  readonly kh_dkh: number
  readonly ionic_strength_mol_l?: number | undefined
  /** At 25 °C. */
  readonly conductivity_us_cm?: number | undefined
  readonly tds_mg_l?: number | undefined
  /** What the TDS meter multiplies its conductivity with (0.5 to 0.7). Absent: weighed solids. */
  readonly tds_factor?: number | undefined
  readonly gh_dgh?: number | undefined
}

/** Named after the input it came from. */
export type IonicStrengthSource =
  | "ionic_strength_mol_l"
  | "conductivity_us_cm"
  | "tds_mg_l"
  | "gh_dgh"
  | "kh_dkh"

export interface IonicStrength {
  readonly ionic_strength_mol_l: number
  readonly ionic_strength_source: IonicStrengthSource
}

/** Above this the activity model does not hold: brackish water. @source truesdellJones1974, range of use */
export const MAX_IONIC_STRENGTH_MOL_L = 0.05

/**
 * Standard error of ln CO2 that the estimate brings in, with the rest of the model.
 * Measured against PHREEQC on tank waters: conductivity -1.4 to +0.9 %, KH alone -2.1 to +3.7 %.
 */
export const MODEL_SIGMA: Readonly<Record<IonicStrengthSource, number>> = {
  ionic_strength_mol_l: 0.01,
  conductivity_us_cm: 0.01,
  tds_mg_l: 0.02,
  gh_dgh: 0.02,
  kh_dkh: 0.02,
}

/** Ionic strength of water of which only the conductivity at 25 °C is known. @source marionBabcock1976 */
export function ionicStrengthFromConductivity(conductivity_us_cm: number): number {
  return 10 ** (1.159 + 1.009 * Math.log10(conductivity_us_cm / 1000)) / 1000
}

/** A made-up solution of sodium bicarbonate in demineralised water: one ion pair for each charge. Exact. */
export function ionicStrengthOfReference(kh_dkh: number): number {
  return kh_dkh * ALKALINITY_MOL_L_PER_DKH
}

/**
 * Ionic strength in mol/L from the best reading given, and which one that was.
 *
 * Throws {@link OutOfDomain} on that reading when it says more than 0.05 mol/L.
 */
export function ionicStrength(water: WaterReadings): IonicStrength {
  const source = bestReading(water)
  const value = estimate(source, water)
  if (value > MAX_IONIC_STRENGTH_MOL_L) {
    throw new OutOfDomain(
      source,
      `means an ionic strength of ${value.toPrecision(2)} mol/L; the fresh water model ends at 0.05 (about 3,500 µS/cm). Brackish and sea water need another model.`,
    )
  }
  return { ionic_strength_mol_l: value, ionic_strength_source: source }
}

function bestReading(water: WaterReadings): IonicStrengthSource {
  if (water.ionic_strength_mol_l !== undefined) return "ionic_strength_mol_l"
  if (water.conductivity_us_cm !== undefined) return "conductivity_us_cm"
  if (water.tds_mg_l !== undefined) return "tds_mg_l"
  if (water.gh_dgh !== undefined) return "gh_dgh"
  return "kh_dkh"
}

function estimate(source: IonicStrengthSource, water: WaterReadings): number {
  const alkalinity = water.kh_dkh * ALKALINITY_MOL_L_PER_DKH
  switch (source) {
    case "ionic_strength_mol_l":
      return water.ionic_strength_mol_l!
    case "conductivity_us_cm":
      return ionicStrengthFromConductivity(water.conductivity_us_cm!)
    case "tds_mg_l":
      return water.tds_factor === undefined
        ? 2.5e-5 * water.tds_mg_l! // @source langelier1936
        : ionicStrengthFromConductivity(water.tds_mg_l! / water.tds_factor)
    case "gh_dgh": {
      // Calcium and magnesium bicarbonate or chloride, with 0.5 mmol/L for salts that nobody listed.
      const hardness = water.gh_dgh! * HARDNESS_MOL_L_PER_DGH
      return hardness + Math.max(alkalinity, 2 * hardness) + 0.0005
    }
    case "kh_dkh":
      // Calcium bicarbonate water with 1 mmol/L of other salts.
      return 1.5 * alkalinity + 0.001
  }
}
