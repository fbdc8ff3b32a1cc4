"use client"

import { useId } from "react"
import type { OperatingPoint } from "@/lib/flow/operating-point"
import type { CurvePoint } from "@/lib/flow/pump-curve"
import { type Reading, written } from "@/lib/units/format"
import { linear, ticksWithin } from "../plot"
import { useWidth } from "../use-width"
import { type Frame, LevelAxis, Mark, PlotFigure, pathOf, UprightAxis } from "./paper"
import { shownIn, symbolIn } from "./shown"

const height = 300

/** A pump's curve against what its loop asks for, now and when the filter is due for cleaning; flow where they meet. */
export function PumpPlot({ flow, reading }: { flow: OperatingPoint; reading: Reading }) {
  const [element, width] = useWidth(620)
  const clip = useId()
  const frame: Frame = { left: 48, top: 28, width: width - 74, height: height - 76 }
  const flowIn = (value: number) => shownIn(value, "L/h", reading)
  const headIn = (value: number) => shownIn(value, "m", reading)
  const most = { flow: flowIn(flow.pump_curve.at(-1)!.flow_l_h), head: headIn(flow.pump_curve[0]!.head_m) }
  const x = linear([0, most.flow], [frame.left, frame.left + frame.width])
  const y = linear([0, most.head * 1.08], [frame.top + frame.height, frame.top])
  const line = (points: readonly CurvePoint[]) =>
    pathOf(points.map(({ flow_l_h, head_m }) => [x(flowIn(flow_l_h)), y(headIn(head_m))] as const))
  const due_m = headAt(flow.due_loop_curve, flow.due_flow_l_h)
  const said = (flow_l_h: number, head_m: number) => {
    const [q, h] = [written(flow_l_h, "L/h", reading, 3), written(head_m, "m", reading, 2)]
    return `${q.figure} ${q.unit} at ${h.figure} ${h.unit}`
  }

  return (
    <PlotFigure
      title="Pump curve and loop curve"
      keys={[
        { label: "Pump" },
        { label: "Loop as it is", colour: "var(--action)" },
        { label: "Loop when due for cleaning", colour: "var(--warning-mark)", dash: "5 3" },
      ]}
      table={{
        columns: [
          `Flow, ${symbolIn("L/h", reading)}`,
          ...["Pump", "Loop", "Loop due"].map((name) => `${name}, ${symbolIn("m", reading)}`),
        ],
        rows: flow.pump_curve.map(({ flow_l_h, head_m }, index) => [
          written(flow_l_h, "L/h", reading, 3).figure,
          ...[head_m, flow.loop_curve[index]!.head_m, flow.due_loop_curve[index]!.head_m].map(
            (head) => written(head, "m", reading, 3).figure,
          ),
        ]),
      }}
    >
      <div ref={element}>
        <svg
          aria-label="Head over flow: the pump's curve falls, the loop's rises; they meet at the flow."
          width={width}
          height={height}
          className="block max-w-full font-mono text-[11px]"
        >
          <UprightAxis
            frame={frame}
            axis={{ scale: y, ticks: ticksWithin(0, most.head), title: `head, ${symbolIn("m", reading)}` }}
          />
          <LevelAxis
            frame={frame}
            axis={{
              scale: x,
              ticks: ticksWithin(0, most.flow, width < 480 ? 3 : 6),
              title: `flow, ${symbolIn("L/h", reading)}`,
            }}
          />
          <clipPath id={clip}>
            <rect x={frame.left} y={frame.top - 4} width={frame.width} height={frame.height + 4} />
          </clipPath>
          <g fill="none" strokeWidth={2} clipPath={`url(#${clip})`}>
            <path d={line(flow.due_loop_curve)} stroke="var(--warning-mark)" strokeDasharray="5 3" />
            <path d={line(flow.loop_curve)} stroke="var(--action)" />
            <path d={line(flow.pump_curve)} stroke="var(--ink)" />
          </g>
          <Mark
            x={x(flowIn(flow.due_flow_l_h))}
            y={y(headIn(due_m))}
            look="hollow"
            name={`Due for cleaning: ${said(flow.due_flow_l_h, due_m)}`}
          />
          <Mark
            x={x(flowIn(flow.flow_l_h))}
            y={y(headIn(flow.head_m))}
            name={`As it is: ${said(flow.flow_l_h, flow.head_m)}`}
          />
          <Readout
            x={x(flowIn(flow.flow_l_h))}
            y={y(headIn(flow.head_m))}
            text={`${written(flow.flow_l_h, "L/h", reading, 3).figure} ${symbolIn("L/h", reading)}`}
            frame={frame}
          />
        </svg>
      </div>
    </PlotFigure>
  )
}

function Readout({ x, y, text, frame }: { x: number; y: number; text: string; frame: Frame }) {
  const isFar = x > frame.left + frame.width * 0.75
  return (
    <text
      x={isFar ? x - 10 : x + 10}
      y={y + 16}
      textAnchor={isFar ? "end" : "start"}
      className="fill-ink font-medium"
      stroke="var(--paper)"
      strokeWidth={4}
      paintOrder="stroke"
    >
      {text}
    </text>
  )
}

function headAt(curve: readonly CurvePoint[], flow_l_h: number): number {
  const after = curve.findIndex((point) => point.flow_l_h >= flow_l_h)
  const [from, to] = [curve[Math.max(0, after - 1)]!, curve[Math.max(0, after)]!]
  if (to.flow_l_h === from.flow_l_h) return to.head_m
  return linear([from.flow_l_h, to.flow_l_h], [from.head_m, to.head_m])(flow_l_h)
}
