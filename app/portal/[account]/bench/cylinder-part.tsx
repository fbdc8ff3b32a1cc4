"use client"

import { closeColumns, Figure, FigureRow } from "@/app/ui/figure"
import { CylinderPlot } from "@/app/ui/plots/cylinder-plot"
import type { RoomVerdict } from "@/lib/gas/room-safety"
import type { Reading } from "@/lib/units/format"
import { amount, cautionsBeside, Part, said } from "./part"
import type { Worked } from "./work-out"

/** How long the cylinder lasts, what it costs, what its gauge shows. */
export function CylinderPart({ worked, reading }: { worked: Worked; reading: Reading }) {
  const { cylinder, dosing } = worked.plan.result
  return (
    <Part title="Cylinder" cautions={cautionsBeside(worked, ["cylinder"])}>
      <FigureRow columns={closeColumns}>
        <Figure
          label={cylinder.days_left < cylinder.days ? "What is left lasts" : "A fill lasts"}
          {...amount(reading, cylinder.days_left, "days_left", 2)}
          under={`${Number(cylinder.refills_per_year.toPrecision(2))} fills a year`}
        />
        <Figure
          label="Refills cost"
          value={cylinder.cost_per_month === null ? "–" : cylinder.cost_per_month.toFixed(2)}
          unit={cylinder.cost_per_month === null ? undefined : "a month"}
          under={
            cylinder.cost_per_month === null
              ? "give the price of a refill"
              : cylinder.first_year_cost === null
                ? "in the currency of the price"
                : `${cylinder.first_year_cost.toFixed(0)} the first year, cylinder included`
          }
        />
        <Figure
          label="Its gauge shows"
          {...amount(reading, cylinder.pressure_bar_abs, "pressure_bar_abs", 2)}
          under={cylinder.liquid_present ? "until the last liquid is gone" : "and falls with the gas"}
        />
        <Figure
          label="Fill"
          value={cylinder.fill_ratio_kg_l.toPrecision(2)}
          unit="kg/L"
          under={`${cylinder.fill_ratio_ok ? "within" : "above"} the ${cylinder.max_fill_ratio_kg_l.toPrecision(2)} that its test allows`}
        />
      </FigureRow>
      {cylinder.days_left > 0 && (
        <CylinderPlot cylinder={cylinder} daily_use_g_day={dosing.daily_use_g_day} reading={reading} />
      )}
    </Part>
  )
}

const verdicts: Record<RoomVerdict, { word: string; tone: string }> = {
  ok: { word: "safe", tone: "text-action" },
  ventilate: { word: "ventilate before staying", tone: "text-warning" },
  leave: { word: "leave and ventilate", tone: "text-danger" },
  life_danger: { word: "danger to life", tone: "text-danger" },
}

/** What becomes of the room when the whole cylinder empties itself into it. */
export function RoomPart({ worked, reading }: { worked: Worked; reading: Reading }) {
  const { room_safety: room, cylinder } = worked.plan.result
  const { word, tone } = verdicts[room.verdict]
  return (
    <Part title="Room" cautions={cautionsBeside(worked, ["room_safety"], [], ["cylinder"])}>
      <FigureRow columns={closeColumns}>
        <Figure
          label={`If all ${said(reading, cylinder.cylinder_mass_g, "cylinder_mass_g", 2)} escape`}
          value={Number(room.peak_ppm.toPrecision(2)).toLocaleString("en")}
          unit="ppm"
          under={<span className={`font-medium ${tone}`}>{word}</span>}
        />
        <Figure
          label="Above 5,000 ppm for"
          value={room.hours_above_5000_ppm === null ? "ever" : room.hours_above_5000_ppm.toPrecision(2)}
          unit={room.hours_above_5000_ppm === null ? undefined : "h"}
          under="the limit of a working day"
        />
        <Figure
          label="Room"
          {...amount(reading, room.room_volume_m3, "room_volume_m3", 2)}
          under={`${worked.input.air_changes_per_h} air changes an hour`}
        />
        {room.dosing_ppm !== null && (
          <Figure
            label="Daily dosing adds"
            value={room.dosing_ppm.toPrecision(2)}
            unit="ppm"
            under="in steady use"
          />
        )}
      </FigureRow>
    </Part>
  )
}
