import { NotConverged } from "@/lib/numeric/find-root"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain, withFields } from "@/lib/units/out-of-domain"
import { waterQuantities } from "@/lib/units/quantities-water"
import type { Answer } from "./answer"
import { type CarbonateSystem, khAtCo2, speciesAtPh } from "./carbonate"
import { carbonateCautions } from "./carbonate-cautions"
import { carbonateMethod, systemOf, type WaterInput, waterAssumptions } from "./carbonate-water"
import { type IonicStrength, ionicStrength, MODEL_SIGMA } from "./ionic-strength"
import { COVERAGE_95, type LogNormal, logNormal, sensitivities } from "./uncertainty"

export interface KhFromCo2Input extends WaterInput {
  readonly co2_mg_l: number
  readonly ph: number
  readonly ph_error: number
}

export interface KhResult extends IonicStrength {
  readonly kh_dkh: number
  readonly kh_low_dkh: number
  readonly kh_high_dkh: number
}

/**
 * Carbonate hardness of a water from its CO2 (by a drop checker, say) and its pH. The CO2 is taken as exact.
 *
 * Equations, sources and accuracy: `carbonateSystem`, `sensitivities`. Throws `OutOfDomain` on the field to change.
 */
export function khFromCo2(
  input: KhFromCo2Input,
): Answer<KhResult, LogNormal<"ph" | "temperature" | "model">> {
  checkBounds(input, waterQuantities)
  const { ph, co2_mg_l } = input
  const { kh_dkh, ionic, system } = solveKh(input, { ph, co2MgL: () => co2_mg_l })
  const species = withFields({ ph: "co2_mg_l", kh_dkh: "co2_mg_l" }, () =>
    speciesAtPh(system, { ph, kh_dkh }),
  )
  const slope = sensitivities(system, { ph, kh_dkh }, species)
  const spread = logNormal({
    ph: Math.abs(slope.ph / slope.kh) * input.ph_error,
    temperature: Math.abs(slope.temperature / slope.kh) * input.temperature_error_c,
    model: MODEL_SIGMA[ionic.ionic_strength_source] / slope.kh,
  })
  const factor = Math.exp(COVERAGE_95 * spread.sigma_ln)
  return {
    result: { kh_dkh, kh_low_dkh: kh_dkh / factor, kh_high_dkh: kh_dkh * factor, ...ionic },
    uncertainty: spread,
    cautions: carbonateCautions({ water: input, ph, kh_dkh, system, species }),
    assumptions: [
      ...waterAssumptions(input, ionic),
      { code: "exact_co2", message: "The CO2 you gave is taken as exact; KH is off by as much as it is." },
    ],
    method: carbonateMethod("Carbonate hardness from CO2 and pH", input, ionic),
  }
}

/** A water whose KH had to be found, with the ionic strength and the system that go with it. */
export interface SolvedWater {
  readonly kh_dkh: number
  readonly ionic: IonicStrength
  readonly system: CarbonateSystem
}

/**
 * KH and the ionic strength that follows from it, in turns until neither moves: 3 to 6 rounds. `co2MgL` may depend on
 * the system, as the CO2 in balance with air does. Throws `OutOfDomain` on `ph` when no KH of the model fits.
 */
export function solveKh(
  water: WaterInput,
  { ph, co2MgL }: { readonly ph: number; readonly co2MgL: (system: CarbonateSystem) => number },
): SolvedWater {
  let kh_dkh = 4
  for (let round = 0; round < 40; round++) {
    const ionic = ionicStrength({ ...water, kh_dkh })
    const system = systemOf(water, ionic)
    const next = khAtCo2(system, { ph, co2_mg_l: co2MgL(system) })
    // A round moves KH by less than a tenth, so far outside is outside for good.
    if (next > 2 * kh.max) requireModelRange(next)
    if (Math.abs(next - kh_dkh) <= 1e-13 * kh_dkh) {
      requireModelRange(next)
      return { kh_dkh: next, ionic, system }
    }
    kh_dkh = next
  }
  throw new NotConverged("iterations", "KH and ionic strength did not settle in 40 rounds")
}

const kh = waterQuantities.kh_dkh

function requireModelRange(kh_dkh: number): void {
  if (kh_dkh >= kh.min && kh_dkh <= kh.max) return
  throw new OutOfDomain(
    "ph",
    `That pH with that CO2 means ${figures(kh_dkh, 3)} dKH, outside ${kh.min} to ${kh.max}. Measure both again.`,
  )
}
