import { waterDensity, waterViscosity } from "@/lib/chemistry/water"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { quantities } from "@/lib/units/quantities"
import { type ElementInput, type Loss, lossOf } from "./elements"
import { type HoseRun, type Loop, quadraticOf, solveFlow } from "./loop"
import { CLEAN_MEDIA_FRACTION, cleanMediaLoss, clogFactor, type MediaLoss } from "./media"
import {
  advertisedCurve,
  atSpeed,
  CURVE_EXPONENT,
  type CurvePoint,
  M3_S_PER_L_H,
  type PumpCurve,
  tabulatedCurve,
} from "./pump-curve"

/** A pump by its two advertised numbers or by points of its curve; `speed_ratio` is 1 if not given. */
export type PumpInput =
  | { readonly max_flow_l_h: number; readonly max_head_m: number; readonly speed_ratio?: number }
  | { readonly points: readonly CurvePoint[]; readonly speed_ratio?: number }

/** A hose; smooth and not corrugated unless it says otherwise. */
export interface HoseInput {
  readonly inner_diameter_mm: number
  readonly length_m: number
  readonly roughness_mm?: number
  readonly corrugation_factor?: number
}

/** A filter's water loop, as on the wire with its defaults filled in. */
export interface LoopInput {
  readonly pump: PumpInput
  /** The whole hose, or the suction side when the `return_hose` has another bore. */
  readonly hose: HoseInput
  readonly return_hose?: HoseInput
  readonly elements: readonly ElementInput[]
  readonly volume_l?: number
  readonly temperature_c: number
  readonly clogging: number
  readonly lift_m: number
  readonly clean_media_fraction: number
}

/** What a loop takes for granted when the caller does not say: the only place. */
export const flowDefaults = {
  temperature_c: 25,
  clogging: 0,
  lift_m: 0,
  clean_media_fraction: CLEAN_MEDIA_FRACTION.typical,
  speed_ratio: 1,
  /** mm. @source white2011, table 6.1: drawn tubing and plastic hose */
  roughness_mm: 0.0015,
  corrugation_factor: 1,
} as const

/** Which of an element's coefficients to take: the typical one or an end of its range. */
export type Fittings = "k" | "low" | "high"

/** A loop made ready for solving: everything that does not change with clogging or flow. */
export interface PreparedLoop {
  readonly input: LoopInput
  readonly pump: PumpCurve
  readonly media: MediaLoss
  readonly hoses: readonly HoseRun[]
  readonly losses: readonly Loss[]
  readonly viscosity_m2_s: number
}

/** True for a pump that is known by two numbers only, whose curve between them is a guess. */
export function isAdvertised(pump: PumpInput): pump is Extract<PumpInput, { max_flow_l_h: number }> {
  return "max_flow_l_h" in pump
}

/** Compiles a loop, an advertised pump curve with its typical shape. Throws {@link OutOfDomain}. */
export function prepareLoop(input: LoopInput): PreparedLoop {
  checkLoop(input)
  const { pump, media } = pumpWithMedia(input, CURVE_EXPONENT.typical)
  if (pump.shutOff_m <= input.lift_m) {
    throw new OutOfDomain(
      "lift_m",
      `The pump raises water ${figures(pump.shutOff_m, 3)} m at most, so none comes out ${figures(input.lift_m, 3)} m above the surface. Lower the outflow or take a pump with more head.`,
    )
  }
  return {
    input,
    pump,
    media,
    hoses: (input.return_hose ? [input.hose, input.return_hose] : [input.hose]).map(hoseRun),
    losses: input.elements.map((element, index) => {
      const hose = (element.in_return && input.return_hose) || input.hose
      return lossOf(element, hose.inner_diameter_mm, index)
    }),
    viscosity_m2_s: waterViscosity(input.temperature_c) / waterDensity(input.temperature_c),
  }
}

/** The same loop with its advertised pump curve bent to another shape. */
export function withCurveShape(prepared: PreparedLoop, exponent: number): PreparedLoop {
  return { ...prepared, ...pumpWithMedia(prepared.input, exponent) }
}

function pumpWithMedia(input: LoopInput, exponent: number): Pick<PreparedLoop, "pump" | "media"> {
  const fullSpeed = isAdvertised(input.pump)
    ? advertisedCurve(input.pump, exponent)
    : tabulatedCurve(input.pump.points)
  return {
    pump: atSpeed(fullSpeed, input.pump.speed_ratio ?? flowDefaults.speed_ratio),
    media: cleanMediaLoss(fullSpeed, input.clean_media_fraction),
  }
}

/** The loop at a state of its media, with typical fittings or an end of their range. */
export function loopAt(prepared: PreparedLoop, clogging: number, fittings: Fittings = "k"): Loop {
  const factor = clogFactor(clogging)
  let quadratic_s2_m5 = factor * prepared.media.quadratic_s2_m5
  for (const loss of prepared.losses) quadratic_s2_m5 += quadraticOf(loss[fittings], loss.bore_mm / 1000)
  return {
    hoses: prepared.hoses,
    linear_s_m2: factor * prepared.media.linear_s_m2,
    quadratic_s2_m5,
    lift_m: prepared.input.lift_m,
    viscosity_m2_s: prepared.viscosity_m2_s,
  }
}

/** Flow of a prepared loop at a state of its media, L/h. */
export function flowAt(prepared: PreparedLoop, clogging: number, fittings: Fittings = "k"): number {
  return solveFlow(prepared.pump, loopAt(prepared, clogging, fittings)) / M3_S_PER_L_H
}

function checkLoop({ pump, hose, return_hose, elements, ...rest }: LoopInput): void {
  checkBounds(rest, quantities)
  checkBounds(pump, quantities, "pump.")
  checkBounds(hose, quantities, "hose.")
  if (return_hose) checkBounds(return_hose, quantities, "return_hose.")
  elements.forEach((element, i) => {
    checkBounds(element, quantities, `elements.${i}.`)
  })
  if (!isAdvertised(pump)) {
    pump.points.forEach((point, i) => {
      checkBounds(point, quantities, `pump.points.${i}.`)
    })
  }
}

function hoseRun(hose: HoseInput): HoseRun {
  return {
    bore_m: hose.inner_diameter_mm / 1000,
    length_m: hose.length_m,
    roughness_m: (hose.roughness_mm ?? flowDefaults.roughness_mm) / 1000,
    corrugation: hose.corrugation_factor ?? flowDefaults.corrugation_factor,
  }
}
