import { type CarbonateSystem, phAtCo2 } from "@/lib/chemistry/carbonate"

/**
 * pH of one water as a function of its CO2 in mg/L, tabulated once from the carbonate model for simulations that ask
 * for it thousands of times: straight lines in ln CO2, within 3e-4 pH of `phAtCo2`. Below 0.01 mg/L it stays at the
 * pH of 0.01 mg/L, where no probe could tell the difference.
 */
export function phCurve(system: CarbonateSystem, kh_dkh: number): (co2_mg_l: number) => number {
  const table = new Float64Array(NODES + 1)
  for (let i = 0; i <= NODES; i++)
    table[i] = phAtCo2(system, { co2_mg_l: Math.exp(LOG_LOW + i * STEP), kh_dkh })
  return (co2_mg_l) => {
    const position = (Math.log(Math.max(co2_mg_l, LOW_MG_L)) - LOG_LOW) / STEP
    const i = Math.min(Math.floor(position), NODES - 1)
    const below = table[i]!
    return below + (position - i) * (table[i + 1]! - below)
  }
}

const LOW_MG_L = 0.01
const HIGH_MG_L = 3000
const NODES = 64
const LOG_LOW = Math.log(LOW_MG_L)
const STEP = (Math.log(HIGH_MG_L) - LOG_LOW) / NODES
