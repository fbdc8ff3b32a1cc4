"use client"

import { useState } from "react"
import { linear, ticksTo } from "../plot"
import { useWidth } from "../use-width"
import { type Frame, PlotFigure, UprightAxis } from "./paper"

export interface Bar {
  readonly label: string
  readonly count: number
  /** Where the colour means something; the word stands under the bar in any case. */
  readonly colour?: string
}

const height = 236
/** Width of one letter of a label. */
const letter = 6.7

/** How many there are of each: one bar for each bucket, in its order, with the values as a table one click away. */
export function CountBars({
  title,
  bars,
  counted,
  axis,
}: {
  title: string
  bars: readonly Bar[]
  /** What is counted, as `tanks`. */
  counted: string
  /** What the buckets are of, with the unit. */
  axis: string
}) {
  const [element, width] = useWidth(640)
  const [pointed, setPointed] = useState<Bar>()
  const frame: Frame = { left: 48, top: 28, width: width - 52, height: height - 76 }
  const ticks = ticksTo(Math.max(...bars.map(({ count }) => count)))
  const foot = frame.top + frame.height
  const y = linear([0, ticks.at(-1) ?? 1], [foot, frame.top])
  const slot = frame.width / bars.length
  const bar = Math.min(slot * 0.82, 88)
  const longest = Math.max(...bars.map(({ label }) => label.length))
  const every = Math.ceil((longest * letter + 8) / slot)

  return (
    <PlotFigure
      title={title}
      table={{
        columns: [axis, counted],
        rows: bars.map(({ label, count }) => [
          label,
          count === 0 ? "fewer than 5" : count.toLocaleString("en"),
        ]),
      }}
    >
      <div ref={element}>
        <svg
          role="img"
          aria-label={`${title}; the table below has the numbers.`}
          width={width}
          height={height}
          className="block max-w-full font-mono text-[11px]"
          onPointerLeave={() => setPointed(undefined)}
        >
          <UprightAxis frame={frame} axis={{ scale: y, ticks, title: counted }} />
          {bars.map((each, index) => (
            <g key={each.label} onPointerEnter={() => setPointed(each)}>
              <rect
                x={frame.left + index * slot}
                y={frame.top}
                width={slot}
                height={frame.height}
                fill="transparent"
              />
              <rect
                x={frame.left + (index + 0.5) * slot - bar / 2}
                y={y(each.count)}
                width={bar}
                height={foot - y(each.count)}
                style={{ fill: each === pointed ? "var(--ink)" : (each.colour ?? "var(--action)") }}
              />
              {index % every === 0 && (
                <text
                  x={frame.left + (index + 0.5) * slot}
                  y={foot + 19}
                  textAnchor="middle"
                  className="fill-soft"
                >
                  {each.label}
                </text>
              )}
            </g>
          ))}
          <path d={`M${frame.left} ${foot}H${frame.left + frame.width}`} stroke="var(--ink)" />
          <text x={frame.left + frame.width} y={foot + 36} textAnchor="end" className="fill-ink">
            {axis}
          </text>
        </svg>
        <p className="min-h-5 font-mono text-xs text-soft" aria-hidden="true">
          {pointed &&
            `${pointed.label}: ${pointed.count === 0 ? "fewer than 5" : pointed.count.toLocaleString("en")} ${counted}`}
        </p>
      </div>
    </PlotFigure>
  )
}
