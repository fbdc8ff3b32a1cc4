import { carbonateSystem, co2AtPressure } from "@/lib/chemistry/carbonate"
import { waterVapourPressureAtm } from "@/lib/chemistry/water"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { risingBubbleEfficiency } from "./bubble-dissolution"
import { bubbleWater } from "./bubble-rise"
import { gasMethods } from "./methods"
import type { Judged, TankInput } from "./tank-input"

/**
 * The share of the gas that dissolves: as given, from the rise of the diffuser's bubbles, or usual for the method.
 *
 * Throws `OutOfDomain` on the bubbles when next to nothing of them dissolves.
 */
export function tankEfficiency(input: TankInput): Judged {
  const { method, dissolution_efficiency, bubble_diameter_mm, depth_m } = input
  if (dissolution_efficiency !== undefined) {
    const value = dissolution_efficiency
    const message = `${percent(value)} of the gas dissolves, as you gave.`
    return { value, low: value, high: value, assumption: { code: "efficiency", message }, sources: [] }
  }
  if (method === "diffuser" && bubble_diameter_mm !== undefined && depth_m !== undefined) {
    return bubbleEfficiency(input, bubble_diameter_mm, depth_m)
  }
  const { label, efficiency } = gasMethods[method]
  const { usual, low, high } = efficiency
  const message = `${percent(usual)} of the gas dissolves with ${label} (${percent(low)} to ${percent(high)}).`
  return {
    value: usual,
    low,
    high,
    assumption: { code: "efficiency", message },
    sources: ["engineeringJudgement"],
  }
}

function bubbleEfficiency(input: TankInput, bubble_diameter_mm: number, depth_m: number): Judged {
  const system = carbonateSystem({ temperature_c: input.temperature_c, ionic_strength_mol_l: 0 })
  const into = {
    water: bubbleWater(input.temperature_c),
    co2_mg_l: input.target_co2_mg_l,
    henry_mg_l_atm: co2AtPressure(system, 1),
    vapour_pressure_atm: waterVapourPressureAtm(input.temperature_c),
  }
  const at = (plume_m_s: number) => risingBubbleEfficiency({ bubble_diameter_mm, depth_m, plume_m_s, into })
  const value = at(PLUME_M_S.usual)
  if (value < LEAST_EFFICIENCY) {
    throw new OutOfDomain(
      "bubble_diameter_mm",
      `Bubbles of ${figures(bubble_diameter_mm, 2)} mm dissolve hardly at all in ${figures(depth_m, 2)} m of water. Give smaller bubbles or more depth.`,
    )
  }
  return {
    value,
    low: at(PLUME_M_S.fast),
    high: at(PLUME_M_S.slow),
    assumption: {
      code: "efficiency_from_bubbles",
      message: `A bubble of ${figures(bubble_diameter_mm, 2)} mm that rises through ${figures(depth_m, 2)} m of water with a plume of ${PLUME_M_S.usual} m/s gives up ${percent(value)} of its CO2. A residue of 2 to 3 % stays as air.`,
    },
    sources: ["schillerNaumann1935", "cliftGraceWeber1978", "frossling1938", "jahne1987", "tsonopoulos1974"],
  }
}

/** m/s of upward water that a diffuser's bubbles drag along; 0 to 0.2 seen, engineering judgement. */
const PLUME_M_S = { usual: 0.1, slow: 0, fast: 0.2 }

/** Below this share a diffuser is none. */
const LEAST_EFFICIENCY = 0.05

function percent(share: number): string {
  return `${figures(100 * share, 2)} %`
}
