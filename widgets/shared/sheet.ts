import { OutOfDomain } from "@/lib/units/out-of-domain"
import { type Field, type FieldKind, fieldOf, slid, typed, type WriteNumber } from "./field"

/** What a calculator is asked: a value for each field, in the engine's units, and what was chosen beside them. */
export interface Asked<Name extends string, Choices extends object> {
  readonly values: Readonly<Record<Name, number>>
  readonly choices: Choices
}

/** A calculator: its fields, what they hold where nothing else is said, and how an answer is worked out. */
export interface SheetKind<Name extends string, Choices extends object, Answer> {
  readonly fields: Readonly<Record<Name, FieldKind>>
  readonly usual: Asked<Name, Choices>
  /** Throws `OutOfDomain` where the values cannot be so together. */
  work(asked: Asked<Name, Choices>): Answer
}

/** A calculator with what stands in it. */
export interface Sheet<Name extends string, Choices extends object, Answer> {
  readonly fields: Readonly<Record<Name, Field>>
  readonly choices: Choices
  /** The last answer that could be worked out, and what it is an answer to. */
  readonly answer: Answer
  readonly asked: Asked<Name, Choices>
  /** The engine's name of what has to change because the values cannot be so together. */
  readonly refused: string | null
  /** A paused calculator takes input and works nothing out. */
  readonly isPaused: boolean
}

export type SheetEvent<Name extends string, Choices extends object> =
  | { readonly type: "typed"; readonly field: Name; readonly text: string }
  | { readonly type: "slid"; readonly field: Name; readonly shown: number }
  | { readonly type: "unit_chosen"; readonly field: Name; readonly unit: string }
  | { readonly type: "chosen"; readonly choices: Partial<Choices> }
  | { readonly type: "paused"; readonly isPaused: boolean }

/** The calculator before anybody has touched it. A start that cannot be gives way to the usual one. */
export function startSheet<Name extends string, Choices extends object, Answer>(
  kind: SheetKind<Name, Choices, Answer>,
  start: Readonly<Record<string, number>>,
  unitOf: (field: Name) => string | null,
  write: WriteNumber,
): Sheet<Name, Choices, Answer> {
  const wanted = eachField(kind, (name) => start[name] ?? kind.usual.values[name])
  const asked = { values: wanted, choices: kind.usual.choices }
  const answer = attempt(() => kind.work(asked))
  const { values } = answer === null ? kind.usual : asked
  return {
    fields: eachField(kind, (name) => fieldOf(kind.fields[name], values[name], unitOf(name), write)),
    choices: kind.usual.choices,
    answer: answer ?? kind.work(kind.usual),
    asked: { values, choices: kind.usual.choices },
    refused: null,
    isPaused: false,
  }
}

/** The calculator after an event. */
export function nextSheet<Name extends string, Choices extends object, Answer>(
  kind: SheetKind<Name, Choices, Answer>,
  sheet: Sheet<Name, Choices, Answer>,
  event: SheetEvent<Name, Choices>,
  write: WriteNumber,
): Sheet<Name, Choices, Answer> {
  switch (event.type) {
    case "typed":
      return withField(event.field, typed(kind.fields[event.field], sheet.fields[event.field], event.text))
    case "slid":
      return withField(
        event.field,
        slid(kind.fields[event.field], sheet.fields[event.field], event.shown, write),
      )
    case "unit_chosen": {
      const { value } = sheet.fields[event.field]
      return withField(event.field, fieldOf(kind.fields[event.field], value, event.unit, write))
    }
    case "chosen":
      return workedOut(kind, { ...sheet, choices: { ...sheet.choices, ...event.choices } })
    case "paused":
      return workedOut(kind, { ...sheet, isPaused: event.isPaused })
  }

  function withField(name: Name, field: Field): Sheet<Name, Choices, Answer> {
    return workedOut(kind, { ...sheet, fields: { ...sheet.fields, [name]: field } })
  }
}

/** Whether the answer shown is of what stands in the fields. */
export function isCurrent<Name extends string, Choices extends object, Answer>({
  fields,
  choices,
  asked,
  refused,
}: Sheet<Name, Choices, Answer>): boolean {
  return (
    refused === null &&
    namesOf(fields).every((name) => !fields[name].problem && fields[name].value === asked.values[name]) &&
    namesOf(choices).every((name) => choices[name] === asked.choices[name])
  )
}

/** The sheet with its answer worked out anew, where that is possible; the last answer stays where it is not. */
function workedOut<Name extends string, Choices extends object, Answer>(
  kind: SheetKind<Name, Choices, Answer>,
  sheet: Sheet<Name, Choices, Answer>,
): Sheet<Name, Choices, Answer> {
  const { fields, choices, isPaused } = sheet
  if (isPaused || namesOf(fields).some((name) => fields[name].problem)) return { ...sheet, refused: null }
  const asked = { values: eachField(kind, (name) => fields[name].value), choices }
  try {
    return { ...sheet, asked, answer: kind.work(asked), refused: null }
  } catch (error) {
    if (!(error instanceof OutOfDomain)) throw error
    return { ...sheet, refused: error.field }
  }
}

/** What the work gives, or null where the values cannot be so. */
export function attempt<T>(work: () => T): T | null {
  try {
    return work()
  } catch (error) {
    if (error instanceof OutOfDomain) return null
    throw error
  }
}

function eachField<Name extends string, T>(
  { fields }: { readonly fields: Readonly<Record<Name, FieldKind>> },
  make: (name: Name) => T,
): Record<Name, T> {
  return Object.fromEntries(namesOf(fields).map((name) => [name, make(name)])) as Record<Name, T>
}

function namesOf<T extends object>(record: T): (keyof T & string)[] {
  return Object.keys(record) as (keyof T & string)[]
}
