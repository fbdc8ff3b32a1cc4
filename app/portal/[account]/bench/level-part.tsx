"use client"

import { closeColumns, Figure, FigureRow } from "@/app/ui/figure"
import { LevelWord } from "@/app/ui/level-word"
import { WaterPlot } from "@/app/ui/plots/water-plot"
import type { Reading } from "@/lib/units/format"
import { cautionsBeside, Part } from "./part"
import type { Worked } from "./work-out"

/** Set-point and level: where the tank is to be held, where it rests, and where it stands now if a pH was read. */
export function LevelPart({ worked, reading }: { worked: Worked; reading: Reading }) {
  const { input, now, plan } = worked
  const { ph, co2, day } = plan.result
  const known = new Set(plan.cautions.map(({ code }) => code))
  const ofReading = now?.cautions.filter(({ code }) => !known.has(code)) ?? []
  return (
    <Part title="Level and set-point" cautions={[...cautionsBeside(worked, ["ph"]), ...ofReading]}>
      <FigureRow columns={closeColumns}>
        {now && (
          <Figure
            label={`CO2 now, at pH ${now.ph}`}
            value={now.result.co2_mg_l.toFixed(now.result.co2_mg_l < 10 ? 1 : 0)}
            unit="mg/L"
            under={
              <>
                {now.result.co2_low_mg_l.toFixed(0)} to {now.result.co2_high_mg_l.toFixed(0)} mg/L{" "}
                <span className="ml-1 text-ink">
                  <LevelWord level={now.result.level} />
                </span>
              </>
            }
          />
        )}
        <Figure
          label="pH at rest in air"
          value={ph.degassed_ph.toFixed(2)}
          under={`the gas lowers it by ${ph.ph_drop.toFixed(2)}`}
        />
        <Figure
          label="pH over a day"
          value={`${day.lowest_ph.toFixed(1)} to ${day.highest_ph.toFixed(1)}`}
          under="evening to morning"
        />
      </FigureRow>
      <WaterPlot
        water={input}
        errors={input}
        setPoint={ph}
        target_co2_mg_l={co2.target_co2_mg_l}
        now={now && { ...now.result, ph: now.ph }}
        reading={reading}
      />
      <p className="max-w-measure text-sm text-soft">
        The word beside a level goes by the upper end of its interval, so that an uncertain reading never
        looks safer than it is. A meter or a test that is finer narrows it.
      </p>
    </Part>
  )
}
