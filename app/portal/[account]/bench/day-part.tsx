"use client"

import { closeColumns, Figure, FigureRow } from "@/app/ui/figure"
import { clock, DayPlot } from "@/app/ui/plots/day-plot"
import type { Reading } from "@/lib/units/format"
import { cautionsBeside, Part, planCodes } from "./part"
import type { Worked } from "./work-out"

/** When the gas opens and closes, who switches it, and the day that comes of it. */
export function DayPart({ worked }: { worked: Worked; reading: Reading }) {
  const { dosing, day, co2 } = worked.plan.result
  const { lead_time } = worked.plan.uncertainty
  const lead =
    lead_time.lead_time_low_min === null
      ? undefined
      : lead_time.lead_time_high_min === null
        ? `${lead_time.lead_time_low_min.toFixed(0)} min or far longer`
        : `${lead_time.lead_time_low_min.toFixed(0)} to ${lead_time.lead_time_high_min.toFixed(0)} min may be needed`
  return (
    <Part title="The day" cautions={cautionsBeside(worked, ["demand", "lead_time"], planCodes.day, ["ph"])}>
      <FigureRow columns={closeColumns}>
        <Figure label="Gas opens" value={clock(day.gas_opens_h)} under={`on a ${dosing.control}`} />
        <Figure
          label="Before the lights"
          value={dosing.open_before_lights_min.toFixed(0)}
          unit="min"
          under={lead}
        />
        <Figure
          label="Lights on"
          value={clock(day.lights_on_h)}
          under={`until ${clock(day.lights_off_h)}; they find ${day.lights_on_co2_mg_l.toFixed(0)} mg/L`}
        />
        <Figure
          label="Gas closes"
          value={clock(day.gas_closes_h)}
          under={`${dosing.close_before_lights_off_min.toFixed(0)} min before dark`}
        />
      </FigureRow>
      <DayPlot day={day} target_co2_mg_l={co2.target_co2_mg_l} />
      <p className="max-w-measure text-sm">{dosing.control_reason}</p>
    </Part>
  )
}
