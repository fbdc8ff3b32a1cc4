"use client"

import type { CylinderLife } from "@/lib/gas/cylinder-life"
import { type Reading, written } from "@/lib/units/format"
import { linear, ticksWithin } from "../plot"
import { useWidth } from "../use-width"
import { type Frame, LevelAxis, Mark, PlotFigure, pathOf, UprightAxis } from "./paper"
import { shownIn, symbolIn } from "./shown"

const height = 260
const DAYS_A_WEEK = 7

/** What is left in a cylinder week by week, with the weeks that leaks or thrift may make of it. */
export function CylinderPlot({
  cylinder,
  daily_use_g_day,
  reading,
}: {
  cylinder: CylinderLife
  daily_use_g_day: number
  reading: Reading
}) {
  const [element, width] = useWidth(620)
  const frame: Frame = { left: 56, top: 28, width: width - 72, height: height - 76 }
  const { days_left, days, liquid_gone_g } = cylinder
  const left_g = cylinder.cylinder_mass_g - cylinder.usable_g + days_left * daily_use_g_day
  const end_g = left_g - days_left * daily_use_g_day
  const share = days_left / days
  const weeks = {
    low: (cylinder.days_low * share) / DAYS_A_WEEK,
    usual: days_left / DAYS_A_WEEK,
    high: (cylinder.days_high * share) / DAYS_A_WEEK,
  }
  const mass = (value: number) => shownIn(value, "g", reading)
  const x = linear([0, weeks.high * 1.06], [frame.left, frame.left + frame.width])
  const y = linear([0, mass(cylinder.cylinder_mass_g) * 1.06], [frame.top + frame.height, frame.top])
  const weekOf = (mass_g: number) => (left_g - mass_g) / daily_use_g_day / DAYS_A_WEEK
  const said = (mass_g: number) => {
    const { figure, unit } = written(mass_g, "g", reading, 2)
    return `${figure} ${unit}`
  }
  const showsLiquid = liquid_gone_g !== null && liquid_gone_g < left_g && liquid_gone_g > end_g

  return (
    <PlotFigure
      title="CO2 in the cylinder over the weeks"
      keys={[{ label: "Expected" }, { label: "Between leaks and thrift", area: true, colour: "var(--line)" }]}
      table={{
        columns: ["Week", `CO2 left, ${symbolIn("g", reading)}`],
        rows: weekTicks(weeks.usual).map((week) => [
          String(week),
          written(left_g - week * DAYS_A_WEEK * daily_use_g_day, "g", reading, 3).figure,
        ]),
      }}
    >
      <div ref={element}>
        <svg
          aria-label="Mass of CO2 in the cylinder, falling week by week"
          width={width}
          height={height}
          className="block max-w-full font-mono text-[11px]"
        >
          <path
            d={`${pathOf([
              [x(0), y(mass(left_g))],
              [x(weeks.low), y(mass(end_g))],
              [x(weeks.high), y(mass(end_g))],
            ])}Z`}
            fill="var(--line)"
          />
          <UprightAxis
            frame={frame}
            axis={{
              scale: y,
              ticks: ticksWithin(0, mass(cylinder.cylinder_mass_g), 4),
              title: `CO2 in it, ${symbolIn("g", reading)}`,
            }}
          />
          <LevelAxis
            frame={frame}
            axis={{
              scale: x,
              ticks: ticksWithin(0, weeks.high, width < 480 ? 4 : 7).filter(Number.isInteger),
              title: "weeks",
            }}
          />
          <path
            d={pathOf([
              [x(0), y(mass(left_g))],
              [x(weeks.usual), y(mass(end_g))],
            ])}
            stroke="var(--ink)"
            strokeWidth={2}
          />
          {showsLiquid && (
            <>
              <Mark
                x={x(weekOf(liquid_gone_g))}
                y={y(mass(liquid_gone_g))}
                look="hollow"
                name={`Last liquid gone at ${said(liquid_gone_g)}, week ${weekOf(liquid_gone_g).toFixed(0)}: from here the gauge falls`}
              />
              <text
                x={frame.left + frame.width}
                y={y(mass(liquid_gone_g)) - 10}
                textAnchor="end"
                className="fill-soft"
              >
                gauge falls from here
              </text>
            </>
          )}
          <Mark
            x={x(weeks.usual)}
            y={y(mass(end_g))}
            name={`Change it in week ${weeks.usual.toFixed(0)}, between ${weeks.low.toFixed(0)} and ${weeks.high.toFixed(0)}`}
          />
        </svg>
      </div>
    </PlotFigure>
  )
}

function weekTicks(weeks: number): number[] {
  const step = Math.max(1, Math.ceil(weeks / 12))
  return Array.from({ length: Math.floor(weeks / step) + 1 }, (_, index) => index * step)
}
