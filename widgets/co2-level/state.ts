import type { Caution, Method } from "@/lib/chemistry/answer"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { type Co2Result, co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { type PhResult, phForCo2 } from "@/lib/chemistry/ph-for-co2"
import { OutOfDomain } from "@/lib/units/out-of-domain"
import { type Field, fieldOf, slid, typed, type WriteNumber } from "@/widgets/shared/field"
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

/** What a planted tank that runs well may read; a widget's own settings go before it. */
const usualTank = { ph: 6.8, kh_dkh: 4, temperature_c: carbonateDefaults.temperature_c }

export type Water = Readonly<Record<FieldName, number>>

/** One answer of the engine, with the water that it is true of. */
export interface Reading {
  readonly water: Water
  readonly phMeter: PhMeter
  readonly khTest: KhTest
  readonly result: Co2Result
  readonly cautions: readonly Caution[]
  readonly method: Method
  /** null: no pH of the model's range gives the target. */
  readonly setPoint: PhResult | null
}

export interface State {
  readonly fields: Readonly<Record<FieldName, Field>>
  readonly phMeter: PhMeter
  readonly khTest: KhTest
  /** The last answer that could be worked out. */
  readonly reading: Reading
  /** Field that has to change because the water cannot be so, though each number alone is good. */
  readonly impossible: "ph" | "kh_dkh" | null
  /** A paused calculator takes input and works nothing out. */
  readonly isPaused: boolean
}

export type Event =
  | { readonly type: "typed"; readonly field: FieldName; readonly text: string }
  | { readonly type: "slid"; readonly field: FieldName; readonly shown: number }
  | { readonly type: "unit_chosen"; readonly field: FieldName; readonly unit: string }
  | { readonly type: "ph_meter_chosen"; readonly phMeter: PhMeter }
  | { readonly type: "kh_test_chosen"; readonly khTest: KhTest }
  | { readonly type: "paused"; readonly isPaused: boolean }

/** The calculator before anybody has touched it. A start that no water can have gives way to a usual tank. */
export function startState({ settings = {} }: Pick<ShownWidget, "settings">, write: WriteNumber): State {
  const wanted = { ...usualTank, ...settings.start }
  return stateAt(wanted, settings, write) ?? (stateAt(usualTank, settings, write) as State)
}

/** The state after an event. */
export function nextState(state: State, event: Event, write: WriteNumber): State {
  switch (event.type) {
    case "typed":
      return withField(
        state,
        event.field,
        typed(waterFields[event.field], state.fields[event.field], event.text),
      )
    case "slid":
      return withField(
        state,
        event.field,
        slid(waterFields[event.field], state.fields[event.field], event.shown, write),
      )
    case "unit_chosen": {
      const { value } = state.fields[event.field]
      return withField(state, event.field, fieldOf(waterFields[event.field], value, event.unit, write))
    }
    case "ph_meter_chosen":
      return workedOut({ ...state, phMeter: event.phMeter })
    case "kh_test_chosen":
      return workedOut({ ...state, khTest: event.khTest })
    case "paused":
      return workedOut({ ...state, isPaused: event.isPaused })
  }
}

/** Whether the answer shown is of what stands in the fields. */
export function isCurrent({ fields, reading, impossible, phMeter, khTest }: State): boolean {
  return (
    impossible === null &&
    reading.phMeter === phMeter &&
    reading.khTest === khTest &&
    fieldNames.every((name) => !fields[name].problem && fields[name].value === reading.water[name])
  )
}

function withField(state: State, name: FieldName, field: Field): State {
  return workedOut({ ...state, fields: { ...state.fields, [name]: field } })
}

/** The state with its answer worked out anew, where that is possible; the last answer stays where it is not. */
function workedOut(state: State): State {
  const { fields, phMeter, khTest } = state
  if (state.isPaused || fieldNames.some((name) => fields[name].problem)) return { ...state, impossible: null }
  const water = {
    ph: fields.ph.value,
    kh_dkh: fields.kh_dkh.value,
    temperature_c: fields.temperature_c.value,
  }
  try {
    return { ...state, reading: readingOf(water, phMeter, khTest), impossible: null }
  } catch (error) {
    if (!(error instanceof OutOfDomain)) throw error
    return { ...state, impossible: error.field === "kh_dkh" ? "kh_dkh" : "ph" }
  }
}

function readingOf(water: Water, phMeter: PhMeter, khTest: KhTest): Reading {
  const input = {
    ...carbonateDefaults,
    ...water,
    ph_error: phMeters[phMeter],
    kh_error_dkh: khTests[khTest],
  }
  const { result, cautions, method } = co2FromPh(input)
  const { ph: _, ...known } = input
  const setPoint = attempt(() => phForCo2({ ...known, co2_mg_l: TARGET_CO2_MG_L }))
  return {
    water,
    phMeter,
    khTest,
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

function stateAt(
  start: Readonly<Record<FieldName, number>>,
  settings: NonNullable<ShownWidget["settings"]>,
  write: WriteNumber,
): State | undefined {
  const phMeter = "pen"
  const khTest = "coarse"
  const water = { ph: start.ph, kh_dkh: start.kh_dkh, temperature_c: start.temperature_c }
  const reading = attempt(() => readingOf(water, phMeter, khTest))
  if (!reading) return undefined
  return {
    fields: {
      ph: fieldOf(waterFields.ph, water.ph, null, write),
      kh_dkh: fieldOf(waterFields.kh_dkh, water.kh_dkh, settings.kh_unit ?? "dkh", write),
      temperature_c: fieldOf(
        waterFields.temperature_c,
        water.temperature_c,
        settings.temperature_unit ?? "c",
        write,
      ),
    },
    phMeter,
    khTest,
    reading,
    impossible: null,
    isPaused: false,
  }
}

function attempt<T>(work: () => T): T | null {
  try {
    return work()
  } catch (error) {
    if (error instanceof OutOfDomain) return null
    throw error
  }
}
