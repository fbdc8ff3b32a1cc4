import type { SchematicValue } from "@/lib/plan/schematic"
import { written } from "@/lib/units/format"
import { type QuantityName, quantities } from "@/lib/units/quantities"

/** A value in three parts, each in its own type: what stands before the number, the number, what stands after it. */
export interface ValueText {
  readonly before: string
  readonly figure: string
  readonly after: string
}

/** Words that make a bare number plain at its place. A unit that reads badly on a drawing is replaced. */
const words: Partial<Record<QuantityName, { before?: string; after?: string }>> = {
  ph: { before: "pH" },
  co2_mg_l: { after: "mg/L CO2" },
  head_m: { after: "m head," },
  pressure_bar_abs: { after: "bar absolute" },
  reynolds: { before: "Re" },
  days: { after: "days a fill" },
  bubbles_per_s: { after: "bubbles a second" },
  turnover_per_h: { after: "times an hour" },
  open_before_lights_min: { after: "min before lights on" },
  close_before_lights_off_min: { after: "min before lights off" },
  body_diameter_mm: { after: "mm bore" },
  outlet_co2_mg_l: { after: "mg/L at its outlet" },
  volume_l: { after: "L of water" },
  line_length_m: { after: "m of line" },
}

const reading = { locale: "en", system: "metric" } as const

export function valueText({ quantity, value, of }: SchematicValue): ValueText {
  const { figure, unit } = written(value, quantities[quantity].unit, reading, 3)
  const { before = "", after = unit } = words[quantity] ?? {}
  return { before, figure, after: of === undefined ? after : `${after} ${of}` }
}

/** The value as one text, for a table. */
export function valueLine(value: SchematicValue): string {
  const { before, figure, after } = valueText(value)
  return [before, figure, after].filter(Boolean).join(" ")
}
