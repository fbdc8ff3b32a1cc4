import type { SchematicValue } from "@/lib/plan/schematic"
import { type Reading, written } from "@/lib/units/format"
import { type QuantityName, quantities } from "@/lib/units/quantities"

/** A value in three parts, each in its own type: what stands before the number, the number, what stands after it. */
export interface ValueText {
  readonly before: string
  readonly figure: string
  readonly after: string
}

/** Words that make a bare number plain at its place, `{}` for its unit. A unit that reads badly is left out. */
const words: Partial<Record<QuantityName, { before?: string; after?: string }>> = {
  ph: { before: "pH" },
  co2_mg_l: { after: "{} CO2" },
  head_m: { after: "{} head," },
  pressure_bar_abs: { after: "{} absolute" },
  reynolds: { before: "Re" },
  days: { after: "days a fill" },
  bubbles_per_s: { after: "bubbles a second" },
  turnover_per_h: { after: "times an hour" },
  open_before_lights_min: { after: "min before lights on" },
  close_before_lights_off_min: { after: "min before lights off" },
  body_diameter_mm: { after: "{} bore" },
  outlet_co2_mg_l: { after: "{} at its outlet" },
  volume_l: { after: "{} of water" },
  line_length_m: { after: "{} of line" },
}

/** How a drawing is read where nobody chose. */
export const plainReading: Reading = { locale: "en", system: "metric" }

export function valueText({ quantity, value, of }: SchematicValue, reading: Reading): ValueText {
  const { figure, unit } = written(value, quantities[quantity].unit, reading, 3)
  const { before = "", after = "{}" } = words[quantity] ?? {}
  const said = after.replace("{}", unit)
  return { before, figure, after: of === undefined ? said : `${said} ${of}` }
}

/** The value as one text, for a table. */
export function valueLine(value: SchematicValue, reading: Reading): string {
  const { before, figure, after } = valueText(value, reading)
  return [before, figure, after].filter(Boolean).join(" ")
}
