"use client"

import { closeColumns, Figure, FigureRow } from "@/app/ui/figure"
import type { Reading } from "@/lib/units/format"
import { amount, cautionsBeside, Part, planCodes, said, span } from "./part"
import type { Worked } from "./work-out"

/** Feed, bubbles and the pressure behind them, and where the gas of a day goes. */
export function GasPart({ worked, reading }: { worked: Worked; reading: Reading }) {
  const { dosing, demand, bubble_rate, working_pressure } = worked.plan.result
  const { bubble_rate: ofBubbles } = worked.plan.uncertainty
  const countable = bubble_rate.bubbles_per_s <= 4
  return (
    <Part
      title="Feed, bubbles, pressure"
      cautions={cautionsBeside(worked, ["bubble_rate", "working_pressure"], planCodes.pressure, [
        "cylinder",
        "lead_time",
      ])}
    >
      <FigureRow columns={closeColumns}>
        <Figure
          label="Feed"
          value={Number(dosing.feed_mg_min.toPrecision(2))}
          unit="mg/min"
          under={`${dosing.feed_ml_min.toPrecision(2)} mL/min of gas`}
        />
        <Figure
          label="Start from"
          value={bubble_rate.bubbles_per_s.toPrecision(2)}
          unit="bubbles a second"
          under={
            countable
              ? `${ofBubbles.bubbles_per_s_low.toPrecision(2)} to ${ofBubbles.bubbles_per_s_high.toPrecision(2)}; counters differ`
              : "too many to count: use a flow meter"
          }
        />
        <Figure
          label="10 mL in a syringe"
          value={bubble_rate.syringe_10_ml_s.toPrecision(2)}
          unit="s"
          under="the sure way to measure the feed"
        />
        <Figure
          label="Reducer to"
          {...amount(reading, working_pressure.working_pressure_bar, "working_pressure_bar", 2)}
          under={span(reading, working_pressure.low_bar, working_pressure.high_bar, "working_pressure_bar")}
        />
      </FigureRow>
      <p className="max-w-measure text-sm">
        Of {said(reading, demand.daily_use_g_day, "daily_use_g_day", 2)} of gas,{" "}
        {said(reading, demand.loss_to_air_g_day, "daily_use_g_day", 2)} leave through the surface,{" "}
        {said(reading, demand.plant_uptake_g_day, "daily_use_g_day", 2)} feed the plants
        {demand.escaped_g_day > 0.005 && (
          <> and {said(reading, demand.escaped_g_day, "daily_use_g_day", 2)} rise out undissolved</>
        )}
        . Holding the level in light takes {demand.hold_feed_mg_min.toPrecision(2)} mg/min; the feed above is{" "}
        {demand.ramp_ratio.toPrecision(2)} times that, to get there in time.
      </p>
    </Part>
  )
}
