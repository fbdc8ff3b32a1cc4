"use client"

import { useState } from "react"
import { Button } from "@/app/ui/button"
import { Notice } from "@/app/ui/notice"
import { linear, ticksWithin } from "@/app/ui/plot"
import { type Frame, LevelAxis, pathOf, UprightAxis } from "@/app/ui/plots/paper"
import { useWidth } from "@/app/ui/use-width"
import type { CurvePoint } from "@/lib/flow/pump-curve"
import { fromBase, toBase, type UnitSystem, units } from "@/lib/units/convert"
import { checkPoints, drawnCurve } from "./pump-points"

const unitsOf = { metric: { flow: "l_h", head: "m" }, us: { flow: "gph", head: "ft" } } as const

/** The points of a pump's curve as a table and as a plot; either moves them. */
export function PumpEditor({
  points,
  onChange,
}: {
  points: readonly CurvePoint[]
  onChange: (points: CurvePoint[]) => void
}) {
  const [system, setSystem] = useState<UnitSystem>("metric")
  const unit = unitsOf[system]
  const { problem, note } = checkPoints(points)
  const put = (index: number, change: Partial<CurvePoint>) =>
    onChange(points.map((point, at) => (at === index ? { ...point, ...change } : point)))
  const add = () => {
    const last = points.at(-1) ?? { flow_l_h: 0, head_m: 1 }
    onChange([...points, { flow_l_h: last.flow_l_h + 100, head_m: Math.max(0, last.head_m - 0.1) }])
  }

  return (
    <div className="space-y-4">
      <label className="flex items-center gap-2 text-sm">
        Units
        <select
          value={system}
          onChange={(event) => setSystem(event.target.value as UnitSystem)}
          className="min-h-8 rounded border border-edge bg-field px-2"
        >
          <option value="metric">L/h and m</option>
          <option value="us">gph and ft</option>
        </select>
      </label>
      <PointsPlot points={points} system={system} onMove={put} />
      <p className="text-sm text-soft">
        Drag a point, or reach it with Tab and move it with the arrow keys; Shift takes bigger steps.
      </p>
      <div aria-live="polite">
        <Notice severity={problem ? "danger" : note?.startsWith("The head rises") ? "warning" : "info"}>
          {problem ?? note}
        </Notice>
      </div>
      <table className="w-full text-left text-sm">
        <caption className="sr-only">Points of the curve</caption>
        <thead className="text-soft">
          <tr>
            <th scope="col" className="py-1 pr-3 font-medium">
              Point
            </th>
            <th scope="col" className="py-1 pr-3 font-medium">
              Flow, {units[unit.flow].symbol}
            </th>
            <th scope="col" className="py-1 pr-3 font-medium">
              Head, {units[unit.head].symbol}
            </th>
            <th scope="col">
              <span className="sr-only">Remove</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {points.map((point, index) => (
            // biome-ignore lint/suspicious/noArrayIndexKey: a point is its place in the list
            <tr key={index} className="border-t border-line">
              <th scope="row" className="py-1 pr-3 font-normal">
                {index + 1}
              </th>
              <td className="py-1 pr-3">
                <NumberCell
                  key={system}
                  label={`Flow of point ${index + 1}`}
                  value={fromBase(point.flow_l_h, unit.flow)}
                  onChange={(value) => put(index, { flow_l_h: toBase(value, unit.flow) })}
                />
              </td>
              <td className="py-1 pr-3">
                <NumberCell
                  key={system}
                  label={`Head of point ${index + 1}`}
                  value={fromBase(point.head_m, unit.head)}
                  onChange={(value) => put(index, { head_m: toBase(value, unit.head) })}
                />
              </td>
              <td className="py-1 text-right">
                <Button
                  look="quiet"
                  small
                  disabled={points.length <= 2}
                  onClick={() => onChange(points.filter((_, at) => at !== index))}
                >
                  Remove<span className="sr-only"> point {index + 1}</span>
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <Button small disabled={points.length >= 60} onClick={add}>
        Add a point
      </Button>
    </div>
  )
}

const rounded = (value: number) => String(Number(value.toPrecision(4)))

/** A number that is written as it is typed, and follows what the plot does while nobody types. */
function NumberCell({
  label,
  value,
  onChange,
}: {
  label: string
  value: number
  onChange: (value: number) => void
}) {
  const [draft, setDraft] = useState<string>()
  return (
    <input
      aria-label={label}
      inputMode="decimal"
      value={draft ?? (Number.isFinite(value) ? rounded(value) : "")}
      aria-invalid={Number.isFinite(value) ? undefined : true}
      onChange={({ target }) => {
        setDraft(target.value)
        onChange(target.value.trim() === "" ? Number.NaN : Number(target.value))
      }}
      onBlur={() => Number.isFinite(value) && setDraft(undefined)}
      className="min-h-8 w-24 max-w-full rounded border border-edge bg-field px-2 font-mono text-ink aria-invalid:border-danger"
    />
  )
}

const height = 260

function PointsPlot({
  points,
  system,
  onMove,
}: {
  points: readonly CurvePoint[]
  system: UnitSystem
  onMove: (index: number, point: CurvePoint) => void
}) {
  const [element, width] = useWidth(480)
  const [held, setHeld] = useState<{ index: number; most: CurvePoint }>()
  const unit = unitsOf[system]
  const known = points.filter(({ flow_l_h, head_m }) => Number.isFinite(flow_l_h) && Number.isFinite(head_m))
  // While a point is dragged the axes stand still, or it would run away from the pointer.
  const most = held?.most ?? {
    flow_l_h: 1.15 * Math.max(100, ...known.map(({ flow_l_h }) => flow_l_h)),
    head_m: 1.15 * Math.max(0.2, ...known.map(({ head_m }) => head_m)),
  }
  const frame: Frame = { left: 44, top: 28, width: width - 60, height: height - 76 }
  const foot = frame.top + frame.height
  const x = linear([0, most.flow_l_h], [frame.left, frame.left + frame.width])
  const y = linear([0, most.head_m], [foot, frame.top])
  const top = { flow: fromBase(most.flow_l_h, unit.flow), head: fromBase(most.head_m, unit.head) }
  const { curve } = checkPoints(points)
  const steps = {
    flow: toBase(system === "us" ? 2 : 10, unit.flow),
    head: toBase(system === "us" ? 0.1 : 0.02, unit.head),
  }
  const moved = (index: number, flow_l_h: number, head_m: number) =>
    onMove(index, {
      flow_l_h: Math.round(Math.min(20_000, Math.max(0, flow_l_h))),
      head_m: Number(Math.min(10, Math.max(0, head_m)).toFixed(3)),
    })

  return (
    <div ref={element}>
      <svg width={width} height={height} className="block max-w-full touch-none font-mono text-[11px]">
        <title>Head over flow: the points and the curve that is fitted through them</title>
        <UprightAxis
          frame={frame}
          axis={{
            scale: (value) => y(toBase(value, unit.head)),
            ticks: ticksWithin(0, top.head),
            title: `head, ${units[unit.head].symbol}`,
          }}
        />
        <LevelAxis
          frame={frame}
          axis={{
            scale: (value) => x(toBase(value, unit.flow)),
            ticks: ticksWithin(0, top.flow, width < 420 ? 3 : 5),
            title: `flow, ${units[unit.flow].symbol}`,
          }}
        />
        {curve && (
          <path
            d={pathOf(
              drawnCurve(curve, most.flow_l_h).map(
                ({ flow_l_h, head_m }) => [x(flow_l_h), y(head_m)] as const,
              ),
            )}
            fill="none"
            stroke="var(--action)"
            strokeWidth={2}
          />
        )}
        {points.map(({ flow_l_h, head_m }, index) => {
          if (!Number.isFinite(flow_l_h) || !Number.isFinite(head_m)) return null
          const said = `${rounded(fromBase(flow_l_h, unit.flow))} ${units[unit.flow].symbol} at ${rounded(fromBase(head_m, unit.head))} ${units[unit.head].symbol}`
          return (
            <g
              // biome-ignore lint/suspicious/noArrayIndexKey: a point is its place in the list
              key={index}
              role="slider"
              tabIndex={0}
              aria-label={`Point ${index + 1}`}
              aria-valuenow={Math.round(flow_l_h)}
              aria-valuemin={0}
              aria-valuemax={20000}
              aria-valuetext={said}
              className="cursor-grab"
              onKeyDown={(event) => {
                const factor = event.shiftKey ? 5 : 1
                const [right, up] = arrows[event.key] ?? []
                if (right === undefined || up === undefined) return
                event.preventDefault()
                moved(index, flow_l_h + right * factor * steps.flow, head_m + up * factor * steps.head)
              }}
              onPointerDown={(event) => {
                event.currentTarget.setPointerCapture(event.pointerId)
                setHeld({ index, most })
              }}
              onPointerMove={(event) => {
                if (held?.index !== index) return
                const box = event.currentTarget.ownerSVGElement!.getBoundingClientRect()
                moved(
                  index,
                  ((event.clientX - box.left - frame.left) / frame.width) * most.flow_l_h,
                  ((foot - (event.clientY - box.top)) / frame.height) * most.head_m,
                )
              }}
              onPointerUp={() => setHeld(undefined)}
              onPointerCancel={() => setHeld(undefined)}
            >
              <circle cx={x(flow_l_h)} cy={y(head_m)} r={14} fill="transparent" />
              <circle
                cx={x(flow_l_h)}
                cy={y(head_m)}
                r={5.5}
                fill="var(--paper)"
                stroke="var(--ink)"
                strokeWidth={2}
              />
            </g>
          )
        })}
      </svg>
    </div>
  )
}

const arrows: Readonly<Record<string, readonly [right: number, up: number]>> = {
  ArrowRight: [1, 0],
  ArrowLeft: [-1, 0],
  ArrowUp: [0, 1],
  ArrowDown: [0, -1],
}
