"use client"

import { useDeferredValue, useState } from "react"
import { Cautions } from "@/app/ui/cautions"
import { Co2Field } from "@/app/ui/co2-field"
import { Input } from "@/app/ui/field"
import { LevelWord } from "@/app/ui/level-word"
import { carbonateDefaults } from "@/lib/chemistry/carbonate-water"
import { co2FromPh } from "@/lib/chemistry/co2-from-ph"
import { type QuantityName, quantities } from "@/lib/units/quantities"
import { type Calculated, calculated, numberIn } from "./calculated"

const fields = [
  { name: "ph", label: "pH", step: 0.05 },
  { name: "kh_dkh", label: "Carbonate hardness", step: 0.5 },
  { name: "temperature_c", label: "Temperature", step: 0.5 },
] as const satisfies readonly { name: QuantityName; label: string; step: number }[]

type Texts = Record<(typeof fields)[number]["name"], string>

/** CO2 of the visitor's own water, worked out in their browser by the engine of the API. */
export function WaterLevel() {
  const [texts, setTexts] = useState<Texts>({ ph: "6.8", kh_dkh: "4", temperature_c: "25" })
  const settled = useDeferredValue(texts)
  const { outcome, water } = answerFor(settled)

  return (
    <div className="grid gap-x-12 gap-y-8 lg:grid-cols-[minmax(0,1fr)_minmax(0,1.4fr)]">
      <div>
        <div className="grid grid-cols-2 gap-4 sm:grid-cols-3">
          {fields.map(({ name, label, step }) => (
            <Input
              key={name}
              label={label}
              unit={quantities[name].unit === "pH" ? undefined : quantities[name].unit}
              type="number"
              step={step}
              min={quantities[name].min}
              max={quantities[name].max}
              value={texts[name]}
              onChange={(event) => setTexts({ ...texts, [name]: event.target.value })}
              error={outcome.problem?.field === name ? outcome.problem.detail : undefined}
            />
          ))}
        </div>
        <div aria-live="polite" className="mt-8">
          {outcome.result && (
            <>
              <p className="font-mono text-5xl leading-none font-medium tracking-tight">
                {outcome.result.result.co2_mg_l.toFixed(0)}
                <span className="ml-3 text-lg font-normal tracking-normal text-soft">mg/L CO2</span>
              </p>
              <p className="mt-2 font-mono text-sm text-soft">
                {outcome.result.result.co2_low_mg_l.toFixed(0)} to{" "}
                {outcome.result.result.co2_high_mg_l.toFixed(0)} mg/L, 95 %
              </p>
              <p className="mt-3 text-lg font-semibold">
                <LevelWord level={outcome.result.result.level} />
              </p>
              <p className="mt-1 text-sm text-soft">
                Read by the upper end of the interval, with a pen that is good to 0.1 pH and a drop test of 1
                dKH a drop.
              </p>
            </>
          )}
        </div>
        {outcome.result && (
          <div className="mt-6">
            <Cautions cautions={outcome.result.cautions} />
          </div>
        )}
      </div>
      {outcome.result && <Co2Field water={water} errors={carbonateDefaults} />}
    </div>
  )
}

function answerFor(texts: Texts) {
  const water = {
    ph: numberIn(texts.ph),
    kh_dkh: numberIn(texts.kh_dkh),
    temperature_c: numberIn(texts.temperature_c),
  }
  const outcome: Calculated<ReturnType<typeof co2FromPh>> =
    missing(water) ?? calculated(() => co2FromPh({ ...carbonateDefaults, ...water }))
  return { outcome, water }
}

function missing(water: Record<string, number>): Calculated<never> | undefined {
  const field = Object.keys(water).find((name) => !Number.isFinite(water[name]))
  return field === undefined ? undefined : { problem: { field, detail: "Write a number." } }
}
