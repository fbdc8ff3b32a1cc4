"use client"

import { Figure, FigureRow } from "@/app/ui/figure"
import { LevelWord } from "@/app/ui/level-word"
import { clock } from "@/app/ui/plots/day-plot"
import type { Reading } from "@/lib/units/format"
import { amount, span } from "./part"
import { VerdictWord } from "./verdict-word"
import type { Worked } from "./work-out"

/** The answer that a customer asks for, before anything is explained. */
export function Answer({ worked, reading }: { worked: Worked; reading: Reading }) {
  const { ph, co2, method, reactor, dosing, day, demand, cylinder } = worked.plan.result
  const { uncertainty } = worked.plan
  const use = uncertainty.demand
  return (
    <div className="pb-6" aria-live="polite">
      <FigureRow columns="grid-cols-2 @min-[36rem]:grid-cols-3 @min-[58rem]:grid-cols-6">
        <Figure
          label="Hold the pH at"
          value={ph.ph.toFixed(2)}
          under={`${ph.ph_low.toFixed(2)} to ${ph.ph_high.toFixed(2)}, 95 %`}
        />
        <Figure
          label="CO2 to hold"
          value={co2.target_co2_mg_l}
          unit="mg/L"
          under={
            <>
              {co2.co2_low_mg_l.toFixed(0)} to {co2.co2_high_mg_l.toFixed(0)} mg/L{" "}
              <span className="ml-1 text-ink">
                <LevelWord level={co2.level} />
              </span>
            </>
          }
        />
        <Figure
          label="Gas goes in by"
          value={<span className="font-sans">{method.label}</span>}
          under={
            method.name === "inline_reactor" ? (
              <VerdictWord verdict={reactor.verdict} />
            ) : method.name === method.recommended ? (
              "suits this tank"
            ) : (
              "as you wish"
            )
          }
        />
        <Figure
          label="Gas opens at"
          value={clock(day.gas_opens_h)}
          under={`${dosing.open_before_lights_min.toFixed(0)} min before the lights, by ${dosing.control}`}
        />
        <Figure
          label="Gas used"
          {...amount(reading, dosing.daily_use_g_day, "daily_use_g_day", 2)}
          under={
            dosing.daily_use_g_day === demand.daily_use_g_day
              ? span(reading, use.daily_use_low_g_day, use.daily_use_high_g_day, "daily_use_g_day")
              : "at the steady feed of the timer"
          }
        />
        <Figure
          label="A fill lasts"
          {...amount(reading, cylinder.days, "days", 2)}
          under={span(reading, cylinder.days_low, cylinder.days_high, "days")}
        />
      </FigureRow>
    </div>
  )
}
