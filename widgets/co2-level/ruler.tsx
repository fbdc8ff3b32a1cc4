import type { Co2Result } from "@/lib/chemistry/co2-from-ph"
import { type Co2Level, co2Bands } from "@/lib/chemistry/level"
import { fixed, type Locale } from "@/widgets/shared/locale"

/** The ruler runs from 2 to 200 mg/L with equal steps for equal ratios, since that is how CO2 answers to pH. */
const from_mg_l = 2
const to_mg_l = 200

const ticks = [5, 10, 20, 30, 40, 60, 100]

interface RulerProps {
  readonly result: Pick<Co2Result, "co2_mg_l" | "co2_low_mg_l" | "co2_high_mg_l" | "level">
  readonly locale: Locale
}

/**
 * The level on a ruler: the bands, the interval as a bar, the value as a mark. A drawing only; the sentence beside it
 * says the same in words.
 */
export function Ruler({ result, locale }: RulerProps) {
  const { co2_mg_l, co2_low_mg_l, co2_high_mg_l } = result
  const low = placeOf(co2_low_mg_l)
  const high = placeOf(co2_high_mg_l)
  const value = placeOf(co2_mg_l)
  return (
    <svg className="ruler" part="ruler" aria-hidden="true" width="100%" height="64">
      {bands().map(({ level, start, end }) => (
        <rect
          key={level}
          className={`band ${level}${level === result.level ? " reached" : ""}`}
          x={percent(start)}
          y="30"
          width={percent(end - start)}
          height="10"
        />
      ))}
      {ticks.map((tick) => (
        <g key={tick} className="tick">
          <line x1={percent(placeOf(tick))} x2={percent(placeOf(tick))} y1="40" y2="46" />
          <text x={percent(placeOf(tick))} y="60">
            {fixed(tick, 0, locale)}
          </text>
        </g>
      ))}
      <line className="interval" x1={percent(low)} x2={percent(high)} y1="17" y2="17" />
      {co2_low_mg_l > from_mg_l && (
        <line className="interval end" x1={percent(low)} x2={percent(low)} y1="11" y2="23" />
      )}
      {co2_high_mg_l < to_mg_l && (
        <line className="interval end" x1={percent(high)} x2={percent(high)} y1="11" y2="42" />
      )}
      <circle className="mark" cx={percent(value)} cy="17" r="5.5" />
    </svg>
  )
}

/** The engine's bands on the ruler, those of one level as one. */
function bands(): { level: Co2Level; start: number; end: number }[] {
  const drawn: { level: Co2Level; start: number; end: number }[] = []
  let start = 0
  for (const { level, up_to_mg_l } of co2Bands) {
    const end = placeOf(up_to_mg_l)
    const last = drawn.at(-1)
    if (last?.level === level) last.end = end
    else drawn.push({ level, start, end })
    start = end
  }
  return drawn
}

/** Where a CO2 level lies on the ruler, from 0 to 1; what lies beyond an end lies at it. */
export function placeOf(co2_mg_l: number): number {
  const place = Math.log(co2_mg_l / from_mg_l) / Math.log(to_mg_l / from_mg_l)
  return Math.min(1, Math.max(0, place))
}

function percent(share: number): string {
  return `${(share * 100).toFixed(2)}%`
}
