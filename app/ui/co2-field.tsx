import { useId, useMemo } from "react"
import type { Co2Level } from "@/lib/chemistry/level"
import type { Reading } from "@/lib/units/format"
import { areas, doubtOf, lineOf, type Place, placeOnMap } from "@/widgets/co2-level/map-geometry"
import { shownIn, symbolIn } from "./plots/shown"

const box = { left: 48, top: 30, width: 470, height: 300 }
const size = { width: 530, height: 376 }
const lines_mg_l = [5, 10, 20, 30, 40, 60]
const phTicks = [5.5, 6, 6.5, 7, 7.5, 8, 8.5]
const khTicks = [0.5, 1, 2, 4, 8, 16]

const fills: Record<Co2Level, string> = {
  low: "var(--level-low)",
  in_range: "var(--level-in-range)",
  high: "var(--level-high)",
  dangerous: "var(--level-dangerous)",
}

/** A set-point: where a controller is to hold a water, where its meter may stand there, and the CO2 that it is for. */
export interface Aim {
  readonly ph: number
  readonly ph_low: number
  readonly ph_high: number
  readonly kh_dkh: number
  readonly co2_mg_l: number
}

/** Where a water lies among all waters of its temperature, with the waters that its readings may as well stand for. */
export function Co2Field({
  water,
  errors,
  aim,
  reading = { locale: "en", system: "metric" },
}: {
  water: { readonly ph: number; readonly kh_dkh: number; readonly temperature_c: number }
  errors: { readonly ph_error: number; readonly kh_error_dkh: number }
  aim?: Aim
  reading?: Reading
}) {
  const clip = useId()
  const { temperature_c } = water
  const ground = useMemo(
    () => ({
      areas: areas(temperature_c).map(({ level, outline }) => ({ level, path: closed(outline) })),
      lines: lines_mg_l.map((co2_mg_l) => ({ co2_mg_l, places: lineOf(co2_mg_l, temperature_c) })),
    }),
    [temperature_c],
  )
  const point = onPaper(placeOnMap(water))
  return (
    <svg
      viewBox={`0 0 ${size.width} ${size.height}`}
      role="img"
      aria-label={`pH ${water.ph} and KH ${water.kh_dkh} dKH among lines of equal CO2`}
      className="w-full max-w-2xl overflow-visible font-mono text-[11px] max-sm:text-[13px]"
    >
      <clipPath id={clip}>
        <rect x={box.left} y={box.top} width={box.width} height={box.height} />
      </clipPath>
      <g clipPath={`url(#${clip})`}>
        {ground.areas.map(({ level, path }) => (
          <path key={level} d={path} fill={fills[level]} fillOpacity={0.16} />
        ))}
        {ground.lines.map(({ co2_mg_l, places }) => (
          <path
            key={co2_mg_l}
            d={open(places)}
            fill="none"
            stroke="var(--ink)"
            strokeOpacity={0.55}
            strokeWidth={0.75}
          />
        ))}
        <path
          d={closed(doubtOf(water, errors))}
          fill="var(--paper)"
          fillOpacity={0.7}
          stroke="var(--ink)"
          strokeDasharray="3 2"
        />
      </g>
      {aim && <AimMark aim={aim} temperature_c={temperature_c} clip={clip} />}
      <path
        d={`M${point.x - 9} ${point.y}h18M${point.x} ${point.y - 9}v18`}
        stroke="var(--ink)"
        strokeWidth={1.5}
        clipPath={`url(#${clip})`}
      />
      <rect x={box.left} y={box.top} width={box.width} height={box.height} fill="none" stroke="var(--ink)" />
      {ground.lines.map(({ co2_mg_l, places }) => (
        <text
          key={co2_mg_l}
          x={onPaper(places.at(-1)!).x}
          y={box.top - 8}
          textAnchor="middle"
          className="fill-ink"
        >
          {co2_mg_l}
        </text>
      ))}
      <text
        x={onPaper(ground.lines.at(-1)!.places.at(-1)!).x - 16}
        y={box.top - 8}
        textAnchor="end"
        className="fill-soft"
      >
        CO2, mg/L
      </text>
      {phTicks.map((ph) => (
        <text
          key={ph}
          x={onPaper(placeOnMap({ ph, kh_dkh: 1 })).x}
          y={box.top + box.height + 18}
          textAnchor="middle"
          className="fill-soft"
        >
          {ph.toFixed(1)}
        </text>
      ))}
      <text x={box.left + box.width / 2} y={size.height - 8} textAnchor="middle" className="fill-ink">
        pH
      </text>
      {khTicks.map((kh_dkh) => (
        <text
          key={kh_dkh}
          x={box.left - 8}
          y={onPaper(placeOnMap({ ph: 7, kh_dkh })).y + 4}
          textAnchor="end"
          className="fill-soft"
        >
          {Number(shownIn(kh_dkh, "dKH", reading).toPrecision(2))}
        </text>
      ))}
      <text x={0} y={box.top - 8} className="fill-ink">
        KH, {symbolIn("dKH", reading)}
      </text>
    </svg>
  )
}

/** The line of the CO2 that is aimed at, and the set-point on it with the span in which a meter may stand. */
function AimMark({ aim, temperature_c, clip }: { aim: Aim; temperature_c: number; clip: string }) {
  const [low, at, high] = [aim.ph_low, aim.ph, aim.ph_high].map((ph) =>
    onPaper(placeOnMap({ ph, kh_dkh: aim.kh_dkh })),
  ) as [Place, Place, Place]
  return (
    <g clipPath={`url(#${clip})`} fill="none" stroke="var(--action)" strokeWidth={2}>
      <path d={open(lineOf(aim.co2_mg_l, temperature_c))} />
      <path d={`M${low.x} ${low.y - 6}v12M${low.x} ${low.y}H${high.x}M${high.x} ${high.y - 6}v12`} />
      <circle cx={at.x} cy={at.y} r={5} fill="var(--paper)" />
    </g>
  )
}

/** Rounded, since the logarithms of a server and of a browser may differ in their last digit. */
function onPaper({ x, y }: Place): Place {
  const round = (value: number) => Math.round(value * 10) / 10
  return { x: round(box.left + x * box.width), y: round(box.top + y * box.height) }
}

function open(places: readonly Place[]): string {
  return `M${places
    .map(onPaper)
    .map(({ x, y }) => `${x.toFixed(1)} ${y.toFixed(1)}`)
    .join("L")}`
}

function closed(places: readonly Place[]): string {
  return `${open(places)}Z`
}
