"use client"

import { memo } from "react"
import { clock } from "@/app/ui/plots/day-plot"
import { SchematicDrawing } from "@/app/ui/schematic/drawing"
import type { Reading } from "@/lib/units/format"
import { said, span } from "./part"
import type { Worked } from "./work-out"

/** The sheet that is handed over on paper: the tank, the answer, the drawing, the cautions, the parts. */
export const PrintSheet = memo(function PrintSheet({
  shop,
  worked,
  reading,
}: {
  shop: string
  worked: Worked
  reading: Reading
}) {
  const { plan } = worked
  const { parts, schematic } = plan.result
  const grave = plan.cautions.filter(({ severity }) => severity !== "info")
  return (
    <article className="hidden text-sm print:block">
      <header className="flex items-baseline justify-between border-b border-ink pb-2">
        <h1 className="text-2xl">CO2 plan</h1>
        <p>
          {shop}, {new Date().toLocaleDateString("en", { dateStyle: "long" })}
        </p>
      </header>
      <div className="mt-4 grid grid-cols-2 gap-x-8">
        <Lines title="The tank" lines={tankLines(worked, reading)} />
        <Lines title="The answer" lines={answerLines(worked, reading)} />
      </div>
      <section className="mt-6 break-before-page">
        <h2 className="text-lg">The system</h2>
        <div className="mt-3 max-w-md">
          <SchematicDrawing schematic={schematic} reading={reading} />
        </div>
      </section>
      <section className="mt-6 break-before-page">
        <h2 className="text-lg">Before you start</h2>
        <ul className="mt-2 space-y-1.5">
          {grave.map(({ code, severity, message }) => (
            <li key={code} className="break-inside-avoid">
              <strong>{severity === "danger" ? "Danger: " : "Caution: "}</strong>
              {message}
            </li>
          ))}
        </ul>
      </section>
      <section className="mt-6">
        <h2 className="text-lg">Parts</h2>
        <table className="mt-2 w-full text-left">
          <tbody>
            {parts.map(({ part, count, requirement }) => (
              <tr key={part} className="break-inside-avoid border-t border-line align-top">
                <td className="w-10 py-1 pr-3 text-right font-mono">{count}</td>
                <td className="py-1">{requirement}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </section>
      <p className="mt-6 border-t border-line pt-2 text-xs">
        Tarnwright engine {plan.method.version}. It informs; it replaces neither the manual of the equipment,
        nor local codes, nor licensed practice.
      </p>
    </article>
  )
})

type Line = readonly [name: string, value: string]

function Lines({ title, lines }: { title: string; lines: readonly Line[] }) {
  return (
    <section>
      <h2 className="text-lg">{title}</h2>
      <dl className="mt-2">
        {lines.map(([name, value]) => (
          <div key={name} className="flex justify-between gap-4 border-t border-line py-1">
            <dt>{name}</dt>
            <dd className="text-right font-mono">{value}</dd>
          </div>
        ))}
      </dl>
    </section>
  )
}

function tankLines({ input, plan, now }: Worked, reading: Reading): Line[] {
  const { volume_l, surface_area_m2, flow } = plan.result
  return [
    ["Water", said(reading, volume_l, "volume_l")],
    ["Open surface", said(reading, surface_area_m2, "surface_area_m2", 2)],
    ["KH", said(reading, input.kh_dkh, "kh_dkh", 2)],
    ["Temperature", said(reading, input.temperature_c, "temperature_c", 3)],
    ...(now ? ([["pH now", now.ph.toFixed(2)]] as const) : []),
    ["Plants", input.plant_demand],
    ["Light", `${input.photoperiod_h} h from ${clock(input.lights_on_h)}`],
    [
      "Hose",
      `${said(reading, input.hose.inner_diameter_mm, "inner_diameter_mm", 2)}, ${said(reading, input.hose.length_m, "length_m", 2)}`,
    ],
    ["Real flow", said(reading, flow.flow_l_h, "flow_l_h", 3)],
    ["Room", said(reading, plan.result.room_safety.room_volume_m3, "room_volume_m3", 2)],
  ]
}

function answerLines({ plan }: Worked, reading: Reading): Line[] {
  const { ph, co2, method, dosing, day, bubble_rate, working_pressure, cylinder, reactor } = plan.result
  return [
    ["Hold the pH at", `${ph.ph.toFixed(2)} (${ph.ph_low.toFixed(2)} to ${ph.ph_high.toFixed(2)})`],
    [
      "CO2 to hold",
      `${co2.target_co2_mg_l} mg/L (${co2.co2_low_mg_l.toFixed(0)} to ${co2.co2_high_mg_l.toFixed(0)})`,
    ],
    ["Gas goes in by", method.label],
    ...(method.name === "inline_reactor" ? ([["Reactor", reactor.verdict]] as const) : []),
    ["Gas open", `${clock(day.gas_opens_h)} to ${clock(day.gas_closes_h)}, by ${dosing.control}`],
    ["Feed", `${dosing.feed_mg_min.toPrecision(2)} mg/min, ${dosing.feed_ml_min.toPrecision(2)} mL/min`],
    ["Start from", `${bubble_rate.bubbles_per_s.toPrecision(2)} bubbles a second`],
    [
      "Reducer to",
      `${said(reading, working_pressure.working_pressure_bar, "working_pressure_bar", 2)} (${span(reading, working_pressure.low_bar, working_pressure.high_bar, "working_pressure_bar")})`,
    ],
    ["Gas used", said(reading, dosing.daily_use_g_day, "daily_use_g_day", 2)],
    [
      "Cylinder",
      `${said(reading, cylinder.cylinder_mass_g, "cylinder_mass_g", 2)}, ${said(reading, cylinder.days, "days", 2)}`,
    ],
  ]
}
