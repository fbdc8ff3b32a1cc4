"use client"

import { useState } from "react"
import { linear, ticksTo } from "./plot"
import { dayOf } from "./time"
import { useWidth } from "./use-width"

export interface DayValue {
  /** As `2026-12-01`. */
  readonly day: string
  readonly value: number
  readonly note: string
}

const height = 232
const edge = { top: 26, right: 4, bottom: 40, left: 60 }

/** One bar a day, with an even pace drawn across where there is one. */
export function DayBars({
  days,
  unit,
  label,
  pace,
}: {
  days: readonly DayValue[]
  unit: string
  label: string
  pace?: number
}) {
  const [element, width] = useWidth(760)
  const [pointed, setPointed] = useState<number>()
  const top = Math.max(...days.map(({ value }) => value))
  // A pace far above every bar would flatten them: it is then only said, not drawn.
  const drawnPace = pace !== undefined && pace <= top * 3 ? pace : undefined
  const ticks = ticksTo(Math.max(top, drawnPace ?? 0))
  const y = linear([0, ticks.at(-1) ?? 1], [height - edge.bottom, edge.top])
  const x = linear([0, days.length], [edge.left, width - edge.right])
  const slot = x(1) - x(0)
  const every = Math.ceil(days.length / Math.max(2, Math.floor((width - edge.left) / 90)))
  const read = pointed === undefined ? undefined : days[pointed]

  return (
    <div ref={element}>
      <svg
        role="img"
        aria-label={label}
        width={width}
        height={height}
        className="block max-w-full font-mono text-[11px]"
        onPointerLeave={() => setPointed(undefined)}
      >
        <text x={0} y={10} className="fill-soft">
          {unit}
        </text>
        {ticks.map((tick) => (
          <g key={tick}>
            <path d={`M${edge.left} ${y(tick)}H${width - edge.right}`} stroke="var(--line)" />
            <text x={edge.left - 8} y={y(tick) + 4} textAnchor="end" className="fill-soft">
              {tick.toLocaleString("en")}
            </text>
          </g>
        ))}
        {days.map(({ day, value }, index) => (
          <g key={day} onPointerEnter={() => setPointed(index)}>
            <rect
              x={x(index)}
              y={edge.top}
              width={slot}
              height={height - edge.top - edge.bottom}
              fill="transparent"
            />
            <rect
              x={x(index) + slot * 0.15}
              y={y(value)}
              width={slot * 0.7}
              height={y(0) - y(value)}
              className={index === pointed ? "fill-ink" : "fill-action"}
            />
            {index % every === 0 && (
              <text x={x(index) + slot / 2} y={height - 22} textAnchor="middle" className="fill-soft">
                {dayOf(day).slice(0, -5)}
              </text>
            )}
          </g>
        ))}
        <path d={`M${edge.left} ${y(0)}H${width - edge.right}`} stroke="var(--ink)" />
        {drawnPace !== undefined && (
          <path
            d={`M${edge.left} ${y(drawnPace)}H${width - edge.right}`}
            stroke="var(--warning-mark)"
            strokeDasharray="4 3"
          />
        )}
        <text x={width - edge.right} y={height - 4} textAnchor="end" className="fill-soft">
          day (UTC)
        </text>
      </svg>
      <p className="min-h-5 font-mono text-xs text-soft" aria-hidden="true">
        {read
          ? `${dayOf(read.day)}: ${read.value.toLocaleString("en")} ${unit}, ${read.note}`
          : pace !== undefined &&
            `Even pace: ${Math.floor(pace).toLocaleString("en")} ${unit} a day${drawnPace ? " (dashed)" : ""}`}
      </p>
    </div>
  )
}
