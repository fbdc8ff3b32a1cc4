import { useId, useMemo } from "react"
import { shownValue, symbolOf } from "@/widgets/shared/field"
import { fixed, numberWriter } from "@/widgets/shared/locale"
import { areas, doubtOf, lineOf, type Place, phOf, placeOnMap } from "./map-geometry"
import { khTests, phMeters, type State } from "./state"
import type { Speech } from "./words"

/** The drawing, in its own units: the map with room for its axes. */
const box = { left: 40, top: 24, width: 300, height: 190 }
const size = { width: 350, height: 256 }

const lines_mg_l = [10, 20, 40, 60]
const table_mg_l = [5, 10, 20, 30, 40, 60]
const phTicks = [5.5, 6, 6.5, 7, 7.5, 8, 8.5]

/** Marks of the KH axis in each unit a shopper can choose. */
const khTicks: Record<string, readonly number[]> = {
  dkh: [0.5, 1, 2, 4, 8, 16],
  kh_ppm_caco3: [10, 20, 50, 100, 200],
  kh_meq_l: [0.2, 0.5, 1, 2, 5],
}

/** Where the water lies among all waters of its temperature: pH across, KH upwards, lines of equal CO2. */
export function WaterMap({ state, locale, messages }: Speech & { readonly state: State }) {
  const clip = useId()
  const { answer, asked, fields } = state
  const { values: water, choices } = asked
  const { unit } = fields.kh_dkh
  const write = numberWriter(locale)
  const { temperature_c } = water
  const ground = useMemo(
    () => ({
      areas: areas(temperature_c).map(({ level, outline }) => ({ level, path: closed(outline) })),
      lines: lines_mg_l.map((co2_mg_l) => ({ co2_mg_l, line: lineOf(co2_mg_l, temperature_c) })),
    }),
    [temperature_c],
  )
  const errors = { ph_error: phMeters[choices.phMeter], kh_error_dkh: khTests[choices.khTest] }
  const point = onPaper(placeOnMap(water))
  // The controller moves along one KH: from where the water is to where it should be held.
  const target = answer.setPoint && onPaper(placeOnMap({ ...water, ph: answer.setPoint.ph }))
  const khPerShown = shownValue(1, unit)

  return (
    <figure className="map" part="map">
      <figcaption className="label">{messages.mapTitle}</figcaption>
      <svg viewBox={`0 0 ${size.width} ${size.height}`} role="img" aria-label={messages.mapTitle}>
        <clipPath id={clip}>
          <rect x={box.left} y={box.top} width={box.width} height={box.height} />
        </clipPath>
        <g clipPath={`url(#${clip})`}>
          {ground.areas.map(({ level, path }) => (
            <path key={level} className={`area ${level}`} d={path} />
          ))}
          {ground.lines.map(({ co2_mg_l, line }) => (
            <path key={co2_mg_l} className="line-of" d={open(line)} />
          ))}
          <path className="doubt" d={closed(doubtOf(water, errors))} />
          {target && <line className="way" x1={point.x} y1={point.y} x2={target.x} y2={target.y} />}
          {target && <circle className="target" cx={target.x} cy={target.y} r="4" />}
          <circle className="mark" cx={point.x} cy={point.y} r="5" />
        </g>
        <rect className="border" x={box.left} y={box.top} width={box.width} height={box.height} />
        <g className="tick">
          {ground.lines.map(({ co2_mg_l, line }) => (
            <text key={co2_mg_l} x={onPaper(line.at(-1)!).x} y={box.top - 7}>
              {fixed(co2_mg_l, 0, locale)}
            </text>
          ))}
          <text className="from-end" x={box.left + box.width} y={box.top - 7}>
            mg/L CO2
          </text>
          {phTicks.map((ph) => (
            <text key={ph} x={onPaper(placeOnMap({ ph, kh_dkh: 1 })).x} y={box.top + box.height + 16}>
              {write(ph, 1)}
            </text>
          ))}
          <text x={box.left + box.width / 2} y={size.height - 6}>
            pH
          </text>
          {khTicks[unit.id ?? ""]?.map((kh) => (
            <text
              key={kh}
              className="from-end"
              x={box.left - 6}
              y={onPaper(placeOnMap({ ph: 7, kh_dkh: kh / khPerShown })).y + 4}
            >
              {write(kh, 1)}
            </text>
          ))}
          <text className="from-start" x="0" y={box.top - 7}>
            {unit.id === "dkh" ? "dKH" : `KH, ${symbolOf(unit)}`}
          </text>
        </g>
      </svg>
      <details className="details">
        <summary>{messages.tableTitle}</summary>
        <table className="table">
          <thead>
            <tr>
              <th scope="col">CO2, mg/L</th>
              <th scope="col">pH</th>
            </tr>
          </thead>
          <tbody>
            {table_mg_l.map((co2_mg_l) => (
              <tr key={co2_mg_l}>
                <th scope="row">{fixed(co2_mg_l, 0, locale)}</th>
                <td>{fixed(phOf({ ...water, co2_mg_l }), 2, locale)}</td>
              </tr>
            ))}
          </tbody>
        </table>
      </details>
    </figure>
  )
}

function onPaper({ x, y }: Place): Place {
  return { x: box.left + x * box.width, y: box.top + y * box.height }
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
