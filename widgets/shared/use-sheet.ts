import { useEffect, useMemo, useReducer } from "react"
import { useSessionState } from "./frame"
import { numberWriter } from "./locale"
import type { CalculatorProps } from "./mount"
import { nextSheet, type Sheet, type SheetEvent, type SheetKind, startSheet } from "./sheet"

/** A calculator with what stands in it, and how to change that. */
export interface InUse<Name extends string, Choices extends object, Answer> {
  readonly kind: SheetKind<Name, Choices, Answer>
  readonly sheet: Sheet<Name, Choices, Answer>
  change(event: SheetEvent<Name, Choices>): void
}

/** Keeps a calculator's sheet. The first change opens the session; without one nothing more is worked out. */
export function useSheet<Name extends string, Choices extends object, Answer>(
  kind: SheetKind<Name, Choices, Answer>,
  { shown, session, locale }: Pick<CalculatorProps<unknown>, "shown" | "session" | "locale">,
): InUse<Name, Choices, Answer> {
  const write = useMemo(() => numberWriter(locale), [locale])
  const [sheet, tell] = useReducer(
    (sheet: Sheet<Name, Choices, Answer>, event: SheetEvent<Name, Choices>) =>
      nextSheet(kind, sheet, event, write),
    shown.settings ?? {},
    (settings) => startSheet(kind, settings, write),
  )
  const state = useSessionState(session)
  useEffect(() => {
    tell({ type: "paused", isPaused: state === "resting" || state === "closed" })
  }, [state])
  return {
    kind,
    sheet,
    change(event) {
      session.begin()
      tell(event)
    },
  }
}
