import { Project, Workspace } from "epanet-js"

/** A loop for EPANET: hoses in series with the loss coefficient of their fittings, between two equal water levels. */
export interface EpanetLoop {
  readonly hoses: readonly {
    bore_mm: number
    length_m: number
    roughness_mm: number
    k: number
    corrugation: number
  }[]
  /** L/h against m, at least four points: EPANET then joins them by straight lines. */
  readonly curve: readonly { flow_l_h: number; head_m: number }[]
  readonly viscosity_m2_s: number
  readonly lift_m: number
}

const FLOW = 8
const RELATIVE_ERROR = 1
const L_MIN_PER_L_H = 1 / 60

/** A solver that keeps one EPANET workspace open: `(loop) => flow in L/h`. */
export async function epanet(): Promise<(loop: EpanetLoop) => number> {
  const workspace = new Workspace()
  await workspace.loadModule()
  return (loop) => {
    workspace.writeFile("loop.inp", inputFile(loop))
    const model = new Project(workspace)
    model.open("loop.inp", "loop.rpt", "loop.out")
    model.solveH()
    if (model.getStatistic(RELATIVE_ERROR) > 1e-5) throw new Error("EPANET did not converge")
    const flow = model.getLinkValue(1, FLOW) / L_MIN_PER_L_H
    model.close()
    return flow
  }
}

/**
 * EPANET's text format. It has no L/h, so litres per minute; a viscosity below 1e-3 is read as m²/s; the default
 * accuracy of 0.001 is too loose for a comparison.
 */
function inputFile({ hoses, curve, viscosity_m2_s, lift_m }: EpanetLoop): string {
  const node = (i: number) => (i === hoses.length ? "TANK" : `N${i}`)
  return [
    "[JUNCTIONS]",
    ...hoses.map((_, i) => `N${i} 0 0`),
    "[RESERVOIRS]",
    "FILTER 0",
    `TANK ${lift_m}`,
    "[PIPES]",
    ...hoses.map(
      (hose, i) =>
        `P${i} ${node(i)} ${node(i + 1)} ${hose.length_m * hose.corrugation} ${hose.bore_mm} ${hose.roughness_mm} ${hose.k} OPEN`,
    ),
    "[PUMPS]",
    "PUMP FILTER N0 HEAD CURVE",
    "[CURVES]",
    ...curve.map((point) => `CURVE ${point.flow_l_h * L_MIN_PER_L_H} ${point.head_m}`),
    "[OPTIONS]",
    "UNITS LPM",
    "HEADLOSS D-W",
    `VISCOSITY ${viscosity_m2_s}`,
    "SPECIFIC GRAVITY 1",
    "TRIALS 200",
    "ACCURACY 1e-5",
    "HEADERROR 1e-9",
    "FLOWCHANGE 1e-9",
    "[END]",
  ].join("\n")
}
