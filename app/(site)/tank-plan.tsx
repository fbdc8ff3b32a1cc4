"use client"

import { useDeferredValue, useMemo, useState } from "react"
import { Cautions } from "@/app/ui/cautions"
import { Input, Select } from "@/app/ui/field"
import { Figure, FigureRow } from "@/app/ui/figure"
import { SchematicDrawing } from "@/app/ui/schematic/drawing"
import type { GasMethodName } from "@/lib/gas/methods"
import { planDefaults } from "@/lib/plan/plan-input"
import { type SystemPlan, systemPlan } from "@/lib/plan/system-plan"
import { calculated, numberIn } from "./calculated"

const fields = [
  { name: "length_cm", label: "Length", unit: "cm", step: 5 },
  { name: "width_cm", label: "Width", unit: "cm", step: 5 },
  { name: "height_cm", label: "Height of water", unit: "cm", step: 5 },
  { name: "kh_dkh", label: "KH", unit: "dKH", step: 0.5 },
  { name: "max_flow_l_h", label: "Filter, flow on its box", unit: "L/h", step: 50 },
  { name: "max_head_m", label: "Filter, head on its box", unit: "m", step: 0.1 },
] as const

type Name = (typeof fields)[number]["name"]
type Texts = Record<Name, string>

const first: Texts = {
  length_cm: "90",
  width_cm: "45",
  height_cm: "45",
  kh_dkh: "4",
  max_flow_l_h: "1200",
  max_head_m: "1.8",
}

const methods: Record<GasMethodName, string> = {
  inline_reactor: "Inline reactor",
  inline_diffuser: "Inline diffuser",
  diffuser: "Diffuser in the tank",
}

/** The whole system for the visitor's own tank, worked out in their browser by the engine of the API. */
export function TankPlan() {
  const [texts, setTexts] = useState(first)
  const [method, setMethod] = useState<GasMethodName | "">("")
  const settled = useDeferredValue(texts)
  const chosen = useDeferredValue(method)
  const outcome = useMemo(() => planFor(settled, chosen), [settled, chosen])
  // While the input is wrong, the last plan stays in sight, faint.
  const [last, setLast] = useState(outcome.result)
  if (outcome.result && outcome.result !== last) setLast(outcome.result)
  const shown = outcome.result ?? last

  return (
    <div>
      <div className="grid grid-cols-2 gap-4 sm:grid-cols-4 xl:grid-cols-7">
        {fields.map(({ name, label, unit, step }) => (
          <Input
            key={name}
            label={<span className="block truncate text-sm">{label}</span>}
            unit={unit}
            type="number"
            step={step}
            min={0}
            value={texts[name]}
            onChange={(event) => setTexts({ ...texts, [name]: event.target.value })}
            error={outcome.problem?.field.endsWith(name) ? outcome.problem.detail : undefined}
          />
        ))}
        <Select
          label={<span className="block truncate text-sm">Gas goes in by</span>}
          value={method}
          onChange={(event) => setMethod(event.target.value as GasMethodName | "")}
        >
          <option value="">What suits it</option>
          {Object.entries(methods).map(([name, label]) => (
            <option key={name} value={name}>
              {label}
            </option>
          ))}
        </Select>
      </div>
      {outcome.problem && !fields.some(({ name }) => outcome.problem.field.endsWith(name)) && (
        <p role="alert" className="mt-3 text-sm text-danger">
          {outcome.problem.detail}
        </p>
      )}
      {shown && (
        <div className={outcome.result ? undefined : "opacity-50"}>
          <div className="mt-10">
            <SchematicDrawing schematic={shown.result.schematic} />
          </div>
          <div className="mt-8" aria-live="polite">
            <PlanFigures plan={shown.result} />
          </div>
          <div className="mt-8">
            <Cautions cautions={shown.cautions} />
          </div>
        </div>
      )}
    </div>
  )
}

function PlanFigures({ plan: { method, ph, dosing, cylinder, reactor, flow } }: { plan: SystemPlan }) {
  return (
    <FigureRow>
      <Figure
        label="Method"
        value={<span className="font-sans">{method.label}</span>}
        under={method.name === "inline_reactor" ? `reactor ${reactor.verdict}` : method.reasons[0]}
      />
      <Figure
        label="Hold the pH at"
        value={ph.ph.toFixed(2)}
        under={`${ph.ph_low.toFixed(2)} to ${ph.ph_high.toFixed(2)}, 95 %`}
      />
      <Figure
        label="Open before the lights"
        value={dosing.open_before_lights_min.toFixed(0)}
        unit="min"
        under={`on a ${dosing.control}`}
      />
      <Figure label="Gas" value={dosing.daily_use_g_day.toFixed(1)} unit="g a day" />
      <Figure
        label="A 2 kg cylinder lasts"
        value={cylinder.days.toFixed(0)}
        unit="days"
        under={`${cylinder.days_low.toFixed(0)} to ${cylinder.days_high.toFixed(0)}`}
      />
      <Figure
        label="Real flow"
        value={flow.flow_l_h.toFixed(0)}
        unit="L/h"
        under="after hose, fittings and media"
      />
    </FigureRow>
  )
}

function planFor(texts: Texts, method: GasMethodName | "") {
  const numbers = Object.fromEntries(fields.map(({ name }) => [name, numberIn(texts[name])])) as Record<
    Name,
    number
  >
  const field = fields.find(({ name }) => !Number.isFinite(numbers[name]))?.name
  if (field) return { result: undefined, problem: { field, detail: "Write a number." } }
  const { max_flow_l_h, max_head_m, ...tank } = numbers
  return calculated(() =>
    systemPlan({
      ...planDefaults,
      ...tank,
      pump: { max_flow_l_h, max_head_m },
      hose: { inner_diameter_mm: 16, length_m: 2.2 },
      ...(method && { equipment: { method } }),
    }),
  )
}
