import type { Selectable } from "kysely"
import type { Schema } from "@/db"
import type { Calculator } from "./calculators"
import { type WidgetSettings, widgetSettings } from "./settings"

/** A widget as its account sees it. */
export type WidgetRow = Omit<Selectable<Schema["widget"]>, "settings" | "calculator"> & {
  readonly calculator: Calculator
  readonly settings: WidgetSettings
}

/** The stored row as a {@link WidgetRow}; a setting that is younger than the row has its default. */
export function widgetRow(stored: Selectable<Schema["widget"]>): WidgetRow {
  return {
    ...stored,
    calculator: stored.calculator as Calculator,
    settings: widgetSettings.parse(stored.settings),
  }
}
