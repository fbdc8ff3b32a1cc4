"use client"

import { type PointerEvent, useState } from "react"
import type { CoursePoint, DayCourse } from "@/lib/plan/day-course"
import { linear, ticksWithin } from "../plot"
import { useWidth } from "../use-width"
import { type Frame, LevelAxis, Mark, PlotFigure, pathOf, UprightAxis } from "./paper"

const height = 430
const hours = [0, 3, 6, 9, 12, 15, 18, 21, 24] as const

/** A day of the tank by the clock: CO2, pH, and when light and gas are on, all over the same hours. */
export function DayPlot({ day, target_co2_mg_l }: { day: DayCourse; target_co2_mg_l: number }) {
  const [element, width] = useWidth(620)
  const [pointed, setPointed] = useState<CoursePoint>()
  const left = 48
  const co2: Frame = { left, top: 28, width: width - left - 12, height: 150 }
  const ph: Frame = { ...co2, top: 222, height: 92 }
  const bars: Frame = { ...co2, top: 336, height: 46 }
  const x = linear([0, 24], [left, left + co2.width])
  const top = Math.max(day.highest_co2_mg_l, target_co2_mg_l) * 1.15
  const y = linear([0, top], [co2.top + co2.height, co2.top])
  const [lowest, highest] = [Math.floor(day.lowest_ph * 5) / 5, Math.ceil(day.highest_ph * 5) / 5]
  const z = linear([lowest, highest], [ph.top + ph.height, ph.top])
  const at = (hour: number) => day.series[Math.round(hour * 4) % day.series.length]!

  function point(event: PointerEvent<SVGSVGElement>) {
    const offset = event.clientX - event.currentTarget.getBoundingClientRect().left
    const hour = linear([left, left + co2.width], [0, 24])(offset)
    setPointed(hour >= 0 && hour <= 24 ? day.series[Math.round(hour * 4)] : undefined)
  }

  return (
    <PlotFigure
      title="A day of CO2 and pH"
      table={{
        columns: ["Time", "CO2, mg/L", "pH"],
        rows: day.series
          .filter(({ t_min }) => t_min % 60 === 0 && t_min < 1440)
          .map(({ t_min, co2_mg_l, ph: value }) => [
            clock(t_min / 60),
            co2_mg_l.toFixed(1),
            value.toFixed(2),
          ]),
      }}
    >
      <div ref={element}>
        <svg
          aria-label="CO2 and pH over the hours of a day, with light and gas as bars under them"
          width={width}
          height={height}
          className="block max-w-full font-mono text-[11px]"
          onPointerMove={point}
          onPointerLeave={() => setPointed(undefined)}
        >
          {spans(day.lights_on_h, day.lights_off_h).map(([from, to]) => (
            <rect
              key={from}
              x={x(from)}
              y={co2.top}
              width={x(to) - x(from)}
              height={bars.top - co2.top}
              fill="var(--sunk)"
            />
          ))}
          <UprightAxis frame={co2} axis={{ scale: y, ticks: ticksWithin(0, top, 4), title: "CO2, mg/L" }} />
          <path
            d={`M${left} ${y(target_co2_mg_l).toFixed(1)}h${co2.width}`}
            stroke="var(--action)"
            strokeDasharray="5 3"
          />
          <text x={left + co2.width} y={y(target_co2_mg_l) - 5} textAnchor="end" className="fill-action">
            to hold
          </text>
          <path
            d={pathOf(day.series.map(({ t_min, co2_mg_l }) => [x(t_min / 60), y(co2_mg_l)] as const))}
            fill="none"
            stroke="var(--ink)"
            strokeWidth={2}
          />
          <UprightAxis
            frame={ph}
            axis={{
              scale: z,
              ticks: ticksWithin(lowest, highest, 3),
              title: "pH",
              write: (value) => value.toFixed(1),
            }}
          />
          <path
            d={pathOf(day.series.map(({ t_min, ph: value }) => [x(t_min / 60), z(value)] as const))}
            fill="none"
            stroke="var(--ink)"
            strokeWidth={2}
          />
          <Bar name="light" y={bars.top + 4} from={day.lights_on_h} to={day.lights_off_h} x={x} />
          <Bar name="gas" y={bars.top + 25} from={day.gas_opens_h} to={day.gas_closes_h} x={x} />
          <LevelAxis
            frame={bars}
            axis={{
              scale: x,
              ticks: hours.filter((hour) => width >= 480 || hour % 6 === 0),
              title: "hour of the day",
            }}
          />
          <Mark
            x={x(day.gas_opens_h)}
            y={y(at(day.gas_opens_h).co2_mg_l)}
            look="hollow"
            name={`Gas opens at ${clock(day.gas_opens_h)}: ${at(day.gas_opens_h).co2_mg_l.toFixed(1)} mg/L`}
          />
          <Mark
            x={x(day.lights_on_h)}
            y={y(day.lights_on_co2_mg_l)}
            name={`Lights on at ${clock(day.lights_on_h)}: ${day.lights_on_co2_mg_l.toFixed(1)} mg/L`}
          />
          {pointed && (
            <path
              d={`M${x(pointed.t_min / 60).toFixed(1)} ${co2.top}V${bars.top + bars.height}`}
              stroke="var(--soft)"
              strokeDasharray="2 2"
            />
          )}
        </svg>
      </div>
      <p className="min-h-5 font-mono text-xs text-soft" aria-hidden="true">
        {pointed
          ? `${clock(pointed.t_min / 60)}: ${pointed.co2_mg_l.toFixed(1)} mg/L CO2, pH ${pointed.ph.toFixed(2)}`
          : `Lights on: ${day.lights_on_co2_mg_l.toFixed(1)} mg/L. Highest ${day.highest_co2_mg_l.toFixed(1)}, lowest ${day.lowest_co2_mg_l.toFixed(1)}.`}
      </p>
    </PlotFigure>
  )
}

function Bar({
  name,
  y,
  from,
  to,
  x,
}: {
  name: string
  y: number
  from: number
  to: number
  x: (hour: number) => number
}) {
  const isGas = name === "gas"
  return (
    <svg
      role="img"
      aria-label={`${isGas ? "Gas" : "Light"} from ${clock(from)} to ${clock(to)}`}
      overflow="visible"
    >
      <text x={x(0) - 8} y={y + 12} textAnchor="end" className="fill-ink">
        {name}
      </text>
      {spans(from, to).map(([start, end]) => (
        <rect
          key={start}
          x={x(start)}
          y={y}
          width={Math.max(0, x(end) - x(start))}
          height={15}
          fill={isGas ? "var(--action)" : "var(--field)"}
          stroke={isGas ? "var(--action)" : "var(--ink)"}
        />
      ))}
    </svg>
  )
}

/** A span of hours that may run over midnight, as the pieces that a day shows. */
export function spans(from: number, to: number): (readonly [number, number])[] {
  return from <= to
    ? [[from, to]]
    : [
        [0, to],
        [from, 24],
      ]
}

/** An hour of the day as a clock shows it. */
export function clock(hours: number): string {
  const minutes = Math.round(hours * 60) % 1440
  return `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, "0")}`
}
