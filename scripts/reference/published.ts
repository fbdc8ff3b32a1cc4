import { logHenry, logK1 } from "@/lib/chemistry/constants"
import { co2Diffusivity, surfaceTension, waterDensity, waterViscosity } from "@/lib/chemistry/water"
import { contractionLoss, expansionLoss } from "@/lib/flow/elements"
import { frictionFactor } from "@/lib/flow/friction"
import { detachedShare, milligramsPerMillilitre } from "@/lib/gas/bubble-count"
import { bubbleRise, bubbleWater } from "@/lib/gas/bubble-rise"
import { CRITICAL_TEMPERATURE_K } from "@/lib/gas/carbon-dioxide"
import { maxFillRatio } from "@/lib/gas/cylinder-state"
import { saturation } from "@/lib/gas/equation-of-state"
import { schmidtNumber } from "@/lib/gas/exchange"
import { LIMITS_PPM } from "@/lib/gas/room-safety"
import {
  BadRow,
  type Deviation,
  deviation,
  number,
  type ReferenceFormat,
  type Row,
  relativeTo,
} from "./format"

/**
 * Single published numbers of flow and gas, each with its own tolerance, and the value that the specification's
 * formulas give for it (column `model`), which the engine has to meet to the printed digits.
 */
export const flowGasPublished: ReferenceFormat = {
  name: "published numbers of flow and gas",
  recognises: (header) =>
    ["quantity", "published", "model", "rel_tol"].every((name) => header.includes(name)),
  check(row) {
    const actual = compute(row.quantity ?? "")
    const exact = row.rel_tol === "exact" || row.rel_tol === "info"
    const tolerance = exact ? 0 : number(row, "rel_tol")
    const published = compare(row, "published", actual, tolerance)
    if (published.length === 0) throw new BadRow(`no number published: ${row.published}`)
    return exact ? published : [...published, ...compare(row, "model", actual, PRINTED)]
  },
}

/** The file prints seven digits. */
const PRINTED = 5e-6

function compare(row: Row, column: string, actual: readonly number[], tolerance: number): Deviation[] {
  const expected = numbersIn(row[column] ?? "", actual.length)
  return expected.map((value, i) =>
    deviation(
      { kind: column, quantity: row.quantity!, expected: value, actual: actual[i]! },
      relativeTo(tolerance),
    ),
  )
}

/** "0.89", "5000/30000/40000" or "5000 (9000 mg/m3)". */
function numbersIn(text: string, count: number): number[] {
  const values = text
    .replace(/\(.*\)/, "")
    .split("/")
    .map(Number)
  return values.length === count && values.every(Number.isFinite) ? values : []
}

function compute(quantity: string): readonly number[] {
  for (const [pattern, value] of quantities) {
    const match = pattern.exec(quantity)
    if (match) return [value(...match.slice(1).map(Number))].flat()
  }
  throw new BadRow(`unknown quantity: ${quantity}`)
}

/** The books' own data: oil at 0.2 m³/s in 200 mm cast iron (0.26 mm), g 9.81 m/s²; feet with g 32.2 ft/s². */
const WHITE_67 = { bore: 0.2, velocity: 0.2 / (Math.PI * 0.01), viscosity: 1e-5, roughness: 0.26e-3, g: 9.81 }
const WHITE_66 = { bore: 0.5, velocity: 6, viscosity: 1.1e-5, roughness: 0.0004, g: 32.2 }
/** Air of 1.23 kg/m³ and 1.79e-5 Pa·s at 50 m/s. */
const MUNSON_85 = { bore: 0.004, velocity: 50, viscosity: 1.79e-5 / 1.23, roughness: 0.0015e-3, g: 9.81 }

/** What the engine says for each quantity, in the row's unit; the pattern's numbers are handed in. */
const quantities: readonly (readonly [RegExp, (...given: number[]) => number | readonly number[]])[] = [
  [/^water dynamic viscosity ([\d.]+) C$/, (t) => waterViscosity(t!) * 1000],
  [/^water density ([\d.]+) C/, (t) => waterDensity(t!)],
  [/^water kinematic viscosity ([\d.]+) C$/, (t) => (1e6 * waterViscosity(t!)) / waterDensity(t!)],
  [/^surface tension water ([\d.]+) C$/, (t) => surfaceTension(t!) * 1000],
  [/^CO2 saturation pressure ([\d.]+) C$/, (t) => saturation(t!)!.pressure_pa / 1e6],
  [/^CO2 critical pressure/, () => saturation(CRITICAL_TEMPERATURE_K - 273.15)!.pressure_pa / 1e6],
  [/^CO2 saturated liquid density ([\d.]+) C$/, (t) => saturation(t!)!.liquid_kg_m3],
  [/^CO2 saturated vapour density ([\d.]+) C$/, (t) => saturation(t!)!.vapour_kg_m3],
  [/^Colebrook worked example: cast iron/, () => pipeFriction(WHITE_67)],
  [/^same example head loss over ([\d.]+) m$/, (length) => headLoss(WHITE_67, length!)],
  [/^White Example 6\.6: .*: f$/, () => pipeFriction(WHITE_66)],
  [/^White Example 6\.6 head loss ([\d.]+) ft$/, (length) => headLoss(WHITE_66, length!)],
  [/^Munson Example 8\.5 air in 4 mm drawn tubing/, () => pipeFriction(MUNSON_85)],
  [/^Smooth pipe Re=([\de]+): f$/, (reynolds) => frictionFactor(reynolds!, 0)],
  [/^Borda-Carnot sudden expansion d\/D=([\d.]+)/, (ratio) => expansionLoss(ratio!)],
  [/^Sudden contraction d\/D=([\d.]+)/, (ratio) => contractionLoss(ratio!)],
  [/^CO2 diffusivity in water ([\d.]+) C$/, (t) => co2Diffusivity(t!) * 1e9],
  [/^Schmidt number CO2 freshwater ([\d.]+) C$/, (t) => schmidtNumber(t!)],
  [/^CO2 pK1 ([\d.]+) C/, (t) => -logK1(t!)],
  [/^CO2 log KH ([\d.]+) C/, (t) => logHenry(t!)],
  [/^Harkins-Brown drop factor f at r\/V\^\(1\/3\)=([\d.]+)$/, (x) => detachedShare(x!)],
  [/^Bubble ([\d.]+) mm in contaminated water/, (mm) => bubbleRise(mm!, bubbleWater(20))],
  // mg/mL is 1e6 times mg/m³ per ppm.
  [/^CO2 1 ppm = mg\/m3 at ([\d.]+) C/, (t) => milligramsPerMillilitre(t!)],
  [/^NIOSH REL TWA/, () => [LIMITS_PPM.working_day, LIMITS_PPM.short_term, LIMITS_PPM.life]],
  [/^EU indicative OEL 8 h$/, () => LIMITS_PPM.working_day],
  [
    /^ADR P200 UN 1013 filling ratio at test pressure (\d+)\/(\d+) bar$/,
    (low, high) => [maxFillRatio(low!), maxFillRatio(high!)],
  ],
]

/** A pipe of a worked example, in the example's own system of units. */
type Pipe = typeof WHITE_67

function pipeFriction({ bore, velocity, viscosity, roughness }: Pipe): number {
  return frictionFactor((velocity * bore) / viscosity, roughness / bore)
}

/** Darcy and Weisbach. */
function headLoss(pipe: Pipe, length: number): number {
  return (pipeFriction(pipe) * (length / pipe.bore) * pipe.velocity ** 2) / (2 * pipe.g)
}
