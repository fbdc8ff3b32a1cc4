import type { Caution, Method } from "@/lib/chemistry/answer"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { type Co2Result, co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { type PhResult, phForCo2 } from "@/lib/chemistry/ph-for-co2"
import type { WriteNumber } from "@/widgets/shared/field"
import {
  type Asked,
  attempt,
  nextSheet,
  type Sheet,
  type SheetEvent,
  type SheetKind,
  startSheet,
} from "@/widgets/shared/sheet"
import type { ShownWidget } from "@/widgets/shared/shown-widget"
import { waterFields } from "@/widgets/shared/water-fields"

export const fieldNames = ["ph", "kh_dkh", "temperature_c"] as const
export type FieldName = (typeof fieldNames)[number]

/** Standard errors of common instruments in pH. Common practice, no source. */
export const phMeters = { bench: 0.02, pen: carbonateDefaults.ph_error, liquid: 0.2 } as const
export type PhMeter = keyof typeof phMeters

/** Standard errors of common tests in dKH: half of what one drop stands for. Common practice, no source. */
export const khTests = { fine: 0.25, coarse: carbonateDefaults.kh_error_dkh } as const
export type KhTest = keyof typeof khTests

/** The CO2 that planted tanks aim at, for the controller's set-point. Common practice, no source. */
export const TARGET_CO2_MG_L = 30

/** With what the shopper measured. */
export interface Choices {
  readonly phMeter: PhMeter
  readonly khTest: KhTest
}

/** What the engine says of one water. */
export interface Reading {
  readonly result: Co2Result
  readonly cautions: readonly Caution[]
  readonly method: Method
  /** null: no pH of the model's range gives the target. */
  readonly setPoint: PhResult | null
}

export type State = Sheet<FieldName, Choices, Reading>
export type Event = SheetEvent<FieldName, Choices>

const co2Level: SheetKind<FieldName, Choices, Reading> = {
  fields: waterFields,
  // What a planted tank that runs well may read; a widget's own settings go before it.
  usual: {
    values: { ph: 6.8, kh_dkh: 4, temperature_c: carbonateDefaults.temperature_c },
    choices: { phMeter: "pen", khTest: "coarse" },
  },
  work: readingOf,
}

/** The calculator before anybody has touched it. */
export function startState({ settings = {} }: Pick<ShownWidget, "settings">, write: WriteNumber): State {
  const units: Record<FieldName, string | null> = {
    ph: null,
    kh_dkh: settings.kh_unit ?? null,
    temperature_c: settings.temperature_unit ?? null,
  }
  return startSheet(co2Level, settings.start ?? {}, (name) => units[name], write)
}

/** The state after an event. */
export function nextState(state: State, event: Event, write: WriteNumber): State {
  return nextSheet(co2Level, state, event, write)
}

/** Field that has to change because the water cannot be so, though each number alone is good. */
export function impossibleField({ refused }: State): "ph" | "kh_dkh" | null {
  return refused === null || refused === "kh_dkh" ? refused : "ph"
}

function readingOf({ values, choices }: Asked<FieldName, Choices>): Reading {
  const input = {
    ...carbonateDefaults,
    ...values,
    ph_error: phMeters[choices.phMeter],
    kh_error_dkh: khTests[choices.khTest],
  }
  const { result, cautions, method } = co2FromPh(input)
  const { ph: _, ...known } = input
  const setPoint = attempt(() => phForCo2({ ...known, co2_mg_l: TARGET_CO2_MG_L }))
  return {
    result,
    cautions: [...cautions, ...setPointCautions(cautions, setPoint?.cautions ?? [])].sort(bySeverity),
    method,
    setPoint: setPoint?.result ?? null,
  }
}

/** What the set-point adds. Its words on livestock and on raising CO2 speak of the target, not of this water. */
function setPointCautions(said: readonly Caution[], more: readonly Caution[]): Caution[] {
  const codes = new Set([...said.map(({ code }) => code), "livestock", "raise_slowly"])
  return more.filter(({ code }) => !codes.has(code))
}

const severities = ["danger", "warning", "info"]

function bySeverity(a: Caution, b: Caution): number {
  return severities.indexOf(a.severity) - severities.indexOf(b.severity)
}
