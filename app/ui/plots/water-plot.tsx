"use client"

import type { Co2Result } from "@/lib/chemistry/co2-from-ph"
import type { PhResult } from "@/lib/chemistry/ph-for-co2"
import { type Reading, written } from "@/lib/units/format"
import { Co2Field } from "../co2-field"
import { type Key, PlotFigure } from "./paper"

/**
 * The field of pH and KH with lines of equal CO2: the set-point with where a meter may stand there, and the water as
 * it was read, with the waters that its readings may as well stand for.
 */
export function WaterPlot({
  water,
  errors,
  setPoint,
  target_co2_mg_l,
  now,
  reading,
}: {
  water: { readonly kh_dkh: number; readonly temperature_c: number }
  errors: { readonly ph_error: number; readonly kh_error_dkh: number }
  setPoint: PhResult
  target_co2_mg_l: number
  now: (Co2Result & { readonly ph: number }) | undefined
  reading: Reading
}) {
  const { kh_dkh } = water
  const hardness = written(kh_dkh, "dKH", reading, 2)
  const keys: Key[] = [
    { label: `Set-point for ${target_co2_mg_l} mg/L, with its interval`, colour: "var(--action)" },
    { label: now ? "The water now" : "A water at the set-point", dash: "3 2" },
  ]
  const kh = `${hardness.figure} ${hardness.unit}`
  const row = (name: string, ph: string, from: number, to: number) => [
    name,
    kh,
    ph,
    `${from.toFixed(0)} to ${to.toFixed(0)}`,
  ]
  return (
    <PlotFigure
      title="pH and hardness with lines of equal CO2"
      keys={keys}
      table={{
        columns: ["Point", "KH", "pH", "CO2, mg/L"],
        rows: [
          row(
            "Set-point",
            `${setPoint.ph.toFixed(2)} (${setPoint.ph_low.toFixed(2)} to ${setPoint.ph_high.toFixed(2)})`,
            setPoint.co2_low_mg_l,
            setPoint.co2_high_mg_l,
          ),
          ...(now ? [row("The water now", now.ph.toFixed(2), now.co2_low_mg_l, now.co2_high_mg_l)] : []),
        ],
      }}
    >
      <Co2Field
        water={{ ...water, ph: now?.ph ?? setPoint.ph }}
        errors={errors}
        aim={{ ...setPoint, kh_dkh, co2_mg_l: target_co2_mg_l }}
        reading={reading}
      />
    </PlotFigure>
  )
}
