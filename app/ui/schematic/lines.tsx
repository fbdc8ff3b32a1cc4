import type { SchematicValue } from "@/lib/plan/schematic"
import type { Reading } from "@/lib/units/format"
import { valueText } from "./value-text"

export const LINE_PX = 18

/** A loss that no gauge shows stands in the table only. */
export function isWorthDrawing({ quantity, value }: SchematicValue): boolean {
  return quantity !== "line_bar" || value >= 0.01
}

/** A label and its values under one another, at the place that they belong to. */
export function Lines({
  x,
  y,
  anchor = "start",
  label,
  values,
  reading,
}: {
  x: number
  y: number
  anchor?: "start" | "end"
  label?: string
  values: readonly SchematicValue[]
  reading: Reading
}) {
  const drawn = values.filter(isWorthDrawing)
  const first = label === undefined ? 0 : 1
  return (
    <text x={x} y={y} textAnchor={anchor} fontSize={13} fill="var(--ink)">
      {label !== undefined && <tspan fontWeight={600}>{label}</tspan>}
      {drawn.map((value, index) => {
        const { before, figure, after } = valueText(value, reading)
        return (
          <tspan key={`${value.quantity} ${value.of ?? ""}`} x={x} dy={index + first === 0 ? 0 : LINE_PX}>
            {before && <tspan fill="var(--soft)">{before} </tspan>}
            <tspan className="font-mono" fontWeight={500}>
              {figure}
            </tspan>
            <tspan fill="var(--soft)" fontSize={12}>
              {" "}
              {after}
            </tspan>
          </tspan>
        )
      })}
    </text>
  )
}
