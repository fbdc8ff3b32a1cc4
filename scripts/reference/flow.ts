import { waterDensity, waterViscosity } from "@/lib/chemistry/water"
import {
  boreArea,
  type HoseRun,
  hoseHead,
  type Loop,
  quadraticOf,
  reynoldsIn,
  solveFlow,
} from "@/lib/flow/loop"
import {
  advertisedCurve,
  atSpeed,
  CURVE_EXPONENT,
  M3_S_PER_L_H,
  type PumpCurve,
  tabulatedCurve,
} from "@/lib/flow/pump-curve"
import {
  BadRow,
  type Deviation,
  deviation,
  number,
  optionalNumber,
  type ReferenceFormat,
  type Row,
  relativeTo,
} from "./format"

/** Loops solved by EPANET and by SciPy; the columns `cb_` are the model that the engine follows. */
export const flow: ReferenceFormat = {
  name: "loops by EPANET and SciPy",
  recognises: (header) => ["segs", "Hmax_m", "points", "cb_Q_Lh"].every((name) => header.includes(name)),
  check(row) {
    const { pump, loop, segments } = loopOfRow(row)
    const flow_m3_s = solveFlow(pump, loop)
    const temperature_c = number(row, "T_C")
    const viscosity = waterViscosity(temperature_c) / waterDensity(temperature_c)
    const flow_l_h = flow_m3_s / M3_S_PER_L_H
    return [
      ...compare(row, "nu_m2s", viscosity, EXACT),
      ...compare(row, "cb_Q_Lh", flow_l_h, EXACT),
      ...compare(row, "cb_pump_head_m", pump.headAt(flow_m3_s), PRINTED),
      ...compareList(
        row,
        "cb_seg_losses_m",
        segments.map(
          ({ hose, k }) =>
            hoseHead(hose, flow_m3_s, loop.viscosity_m2_s) + quadraticOf(k, hose.bore_m) * flow_m3_s ** 2,
        ),
      ),
      ...compareList(
        row,
        "cb_Re",
        segments.map(({ hose }) => reynoldsIn(hose, flow_m3_s, loop.viscosity_m2_s)),
      ),
      ...compareList(
        row,
        "cb_v_ms",
        segments.map(({ hose }) => flow_m3_s / boreArea(hose.bore_m)),
      ),
      ...compare(row, "epanet_Q_Lh", flow_l_h, EPANET),
    ]
  },
}

/** Same formulas, other program: only the last digits may differ. */
const EXACT = 1e-6
/** The same for numbers that the file prints with seven digits. */
const PRINTED = 5e-6
/** EPANET has other friction formulas (Swamee-Jain, Dunlop) and another g. */
const EPANET = 0.006

interface Segment {
  readonly hose: HoseRun
  readonly k: number
}

/** The pump and the loop that a row describes. */
export function loopOfRow(row: Row): { pump: PumpCurve; loop: Loop; segments: Segment[] } {
  const segments = list(row, "segs").map(segment)
  return {
    pump: atSpeed(pumpOfRow(row), optionalNumber(row, "speed") ?? 1),
    segments,
    loop: {
      hoses: segments.map(({ hose }) => hose),
      linear_s_m2: (optionalNumber(row, "Alin_m_per_Lh") ?? 0) / M3_S_PER_L_H,
      quadratic_s2_m5: segments.reduce((sum, { hose, k }) => sum + quadraticOf(k, hose.bore_m), 0),
      lift_m: optionalNumber(row, "lift_m") ?? 0,
      viscosity_m2_s: number(row, "nu_m2s"),
    },
  }
}

function pumpOfRow(row: Row): PumpCurve {
  if (row.points) {
    return tabulatedCurve(
      list(row, "points").map((point) => {
        const [flow_l_h, head_m] = numbers(point, ":", 2)
        return { flow_l_h: flow_l_h!, head_m: head_m! }
      }),
    )
  }
  const advertised = { max_flow_l_h: number(row, "Qmax_Lh"), max_head_m: number(row, "Hmax_m") }
  return advertisedCurve(advertised, optionalNumber(row, "n") ?? CURVE_EXPONENT.typical)
}

/** "bore_mm/length_m/roughness_mm/K/corrugation" */
function segment(text: string): Segment {
  const [bore_mm, length_m, roughness_mm, k, corrugation] = numbers(text, "/", 5)
  return {
    hose: {
      bore_m: bore_mm! / 1000,
      length_m: length_m!,
      roughness_m: roughness_mm! / 1000,
      corrugation: corrugation!,
    },
    k: k!,
  }
}

function list(row: Row, column: string): string[] {
  const text = row[column]
  if (!text) throw new BadRow(`${column} is missing`)
  return text.split("|")
}

function numbers(text: string, separator: string, count: number): number[] {
  const values = text.split(separator).map(Number)
  if (values.length !== count || !values.every(Number.isFinite)) {
    throw new BadRow(`${text} is not ${count} numbers joined by ${separator}`)
  }
  return values
}

function compare(row: Row, quantity: string, actual: number, tolerance: number): Deviation[] {
  const expected = optionalNumber(row, quantity)
  if (expected === undefined) return []
  return [deviation({ kind: kindOf(row), quantity, expected, actual }, relativeTo(tolerance))]
}

function compareList(row: Row, quantity: string, actual: readonly number[]): Deviation[] {
  if (!row[quantity]) return []
  const expected = numbers(row[quantity], "|", actual.length)
  return expected.map((value, i) =>
    deviation({ kind: kindOf(row), quantity, expected: value, actual: actual[i]! }, relativeTo(PRINTED)),
  )
}

function kindOf(row: Row): string {
  return row.note || "loop"
}
