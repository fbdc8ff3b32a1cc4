import { type Answer, type Caution, method } from "@/lib/chemistry/answer"
import { checkValve, cylinderSecured, localRules } from "@/lib/chemistry/cautions"
import { waterDensity } from "@/lib/chemistry/water"
import { checkBounds } from "@/lib/units/bounds"
import { figures } from "@/lib/units/figures"
import { quantities } from "@/lib/units/quantities"
import { milligramsPerMillilitre } from "./bubble-count"
import { GRAVITY_M_S2 } from "./bubble-rise"
import { type GasMethodName, gasMethods, PORE_BAR_UM } from "./methods"

export interface WorkingPressureInput {
  readonly method: GasMethodName
  readonly depth_m: number
  readonly check_valve_bar: number
  readonly line_length_m: number
  readonly line_diameter_mm: number
  /** Of a diffuser whose pores are known; it replaces the method's usual element pressure. */
  readonly pore_diameter_um?: number | undefined
  readonly feed_mg_min?: number | undefined
  /** What the reducer is set to. Absent: the verdict is on the recommended pressure. */
  readonly setting_bar?: number | undefined
}

/** `too_low`: no gas or now and then. `unsteady`: too little left for the needle valve to act on. */
export type PressureVerdict = "too_low" | "unsteady" | "sufficient" | "hard_to_trim" | "check_hose"

export interface WorkingPressure {
  readonly working_pressure_bar: number
  readonly low_bar: number
  readonly high_bar: number
  readonly verdict: PressureVerdict
  readonly element_bar: number
  readonly water_bar: number
  readonly check_valve_bar: number
  readonly line_bar: number
}

/**
 * The gauge pressure to set a reducer to: reactor or diffuser, water above the outlet, check valve and line, and a
 * margin for the needle valve.
 *
 * Pores by the Young-Laplace equation, line by Hagen-Poiseuille, the rest typical values with their range. Throws
 * `OutOfDomain` on a value out of bounds.
 */
export function workingPressure(input: WorkingPressureInput): Answer<WorkingPressure> {
  checkBounds(input, quantities)
  const element = elementPressure(input)
  const water_bar = (waterDensity(WATER_C) * GRAVITY_M_S2 * input.depth_m) / 1e5
  const line_bar = lineLoss(input)
  const rest = water_bar + line_bar + MARGIN_BAR
  const working_pressure_bar = element.usual + input.check_valve_bar + rest
  const verdict = verdictOn(input.setting_bar ?? working_pressure_bar, working_pressure_bar)
  return {
    result: {
      working_pressure_bar,
      low_bar: element.low + Math.min(CHECK_VALVE_BAR.low, input.check_valve_bar) + rest,
      high_bar: element.high + Math.max(CHECK_VALVE_BAR.high, input.check_valve_bar) + rest,
      verdict,
      element_bar: element.usual,
      water_bar,
      check_valve_bar: input.check_valve_bar,
      line_bar,
    },
    uncertainty: {},
    cautions: [
      ...verdictCaution(verdict, input.setting_bar ?? working_pressure_bar, working_pressure_bar),
      orderOfParts,
      checkValve,
      cylinderSecured,
      localRules,
    ],
    assumptions: [
      {
        code: "element",
        message:
          input.pore_diameter_um === undefined
            ? `For ${gasMethods[input.method].label} ${figures(element.low, 2)} to ${figures(element.high, 2)} bar are usual.`
            : `Pores of ${figures(input.pore_diameter_um, 2)} µm open at ${figures(element.usual, 2)} bar; makers' pore sizes hold within a fifth.`,
      },
      {
        code: "margin",
        message: `${MARGIN_BAR} bar are left to drop over the needle valve, so that it regulates steadily. Check valves open at ${CHECK_VALVE_BAR.low} to ${CHECK_VALVE_BAR.high} bar.`,
      },
    ],
    method: method("Sum of the pressures along the gas line", [
      "youngLaplace",
      "hagenPoiseuille",
      "iapws1976",
      "engineeringJudgement",
    ]),
  }
}

/** °C; between 15 and 30 the pressures change by less than 3 %. */
const WATER_C = 25
/** bar over the needle valve. Judgement. */
const MARGIN_BAR = 0.5
/** bar at which check valves crack. Judgement. */
const CHECK_VALVE_BAR = { low: 0.05, high: 0.35 }
/** Relative error of a stated pore size. Judgement. */
const PORE_SPREAD = 0.2
/** mg/min, when no feed is given; the line's loss is below 0.01 bar for any feed of a tank. */
const USUAL_FEED_MG_MIN = 60
/** Pa·s of CO2 gas at 25 °C and up to 10 bar. @source fenghour1998 */
const GAS_VISCOSITY_PA_S = 14.9e-6

function elementPressure({ method: name, pore_diameter_um }: WorkingPressureInput) {
  if (pore_diameter_um === undefined || name === "inline_reactor") return gasMethods[name].element_bar
  const loop =
    name === "inline_diffuser" ? gasMethods.inline_reactor.element_bar : { usual: 0, low: 0, high: 0 }
  const pore = PORE_BAR_UM / pore_diameter_um
  return {
    usual: pore + loop.usual,
    low: pore * (1 - PORE_SPREAD) + loop.low,
    high: pore * (1 + PORE_SPREAD) + loop.high,
  }
}

/** bar lost along the gas line at 1 atm, the most it can be. @source hagenPoiseuille */
function lineLoss(input: WorkingPressureInput): number {
  const feed_mg_min = input.feed_mg_min ?? USUAL_FEED_MG_MIN
  const flow_m3_s = feed_mg_min / milligramsPerMillilitre(WATER_C) / 6e7
  const bore_m = input.line_diameter_mm / 1000
  return (128 * GAS_VISCOSITY_PA_S * input.line_length_m * flow_m3_s) / (Math.PI * bore_m ** 4) / 1e5
}

/** bar above the need at which a fine needle valve becomes hard to trim, and at which hoses are to be checked. */
const TOO_MUCH_BAR = 1.5
const HOSE_BAR = 4

function verdictOn(setting_bar: number, need_bar: number): PressureVerdict {
  if (setting_bar > HOSE_BAR) return "check_hose"
  if (setting_bar < need_bar - MARGIN_BAR) return "too_low"
  if (setting_bar < need_bar) return "unsteady"
  return setting_bar > need_bar + TOO_MUCH_BAR ? "hard_to_trim" : "sufficient"
}

function verdictCaution(verdict: PressureVerdict, setting_bar: number, need_bar: number): Caution[] {
  const set = `${figures(setting_bar, 2)} bar`
  const need = `${figures(need_bar, 2)} bar`
  switch (verdict) {
    case "sufficient":
      return []
    case "too_low":
      return [warning("pressure_too_low", `At ${set} little or no gas comes through. Set ${need}.`)]
    case "unsteady":
      return [warning("pressure_unsteady", `At ${set} gas comes, but the bubble rate wanders. Set ${need}.`)]
    case "hard_to_trim":
      return [
        warning("pressure_hard_to_trim", `At ${set} a simple needle valve is hard to trim. Set ${need}.`),
      ]
    case "check_hose":
      return [
        warning(
          "check_hose",
          `At ${set} check what hose and fittings are rated for; use hose made for pressure, and clamps.`,
        ),
      ]
  }
}

function warning(code: string, message: string): Caution {
  return { code, severity: "warning", message }
}

const orderOfParts: Caution = {
  code: "order_of_parts",
  severity: "info",
  message:
    "From the cylinder on: reducer, solenoid, needle valve, bubble counter, check valve, then reactor or diffuser. Raise the pressure slowly with the needle valve closed.",
}
