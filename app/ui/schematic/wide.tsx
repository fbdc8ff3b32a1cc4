import type { NodeKind, Schematic } from "@/lib/plan/schematic"
import type { Reading } from "@/lib/units/format"
import { Lines } from "./lines"
import { Pipe } from "./pipe"
import { symbols } from "./symbols"

type Anchor = "start" | "end"
interface Place {
  readonly x: number
  readonly y: number
  readonly text: readonly [x: number, y: number, anchor?: Anchor]
}

/** Gas runs along the top, water around the loop below it; the tank stands to the right. */
const places: Record<NodeKind, Place> = {
  cylinder: { x: 74, y: 196, text: [126, 186] },
  reducer: { x: 74, y: 70, text: [106, 98] },
  solenoid: { x: 290, y: 68, text: [226, 112] },
  check_valve: { x: 470, y: 70, text: [442, 112] },
  filter: { x: 346, y: 392, text: [288, 346, "end"] },
  reactor: { x: 600, y: 296, text: [556, 246, "end"] },
  inline_diffuser: { x: 600, y: 296, text: [576, 276, "end"] },
  diffuser: { x: 1050, y: 438, text: [1022, 412, "end"] },
  return: { x: 840, y: 236, text: [676, 84] },
  tank: { x: 910, y: 335, text: [866, 286] },
}

interface Route {
  readonly path: string
  readonly arrow: readonly [x: number, y: number, turn: number]
  readonly text?: readonly [x: number, y: number]
}

const back = "M600 392V430H660V140H840V232"

/** The way of each line, by what it joins. A device of another kind takes another way. */
const routes: Record<string, Route> = {
  "cylinder reducer": { path: "M74 138V90", arrow: [74, 112, -90] },
  "reducer solenoid": { path: "M94 70H270", arrow: [180, 70, 0] },
  "solenoid check_valve": { path: "M310 70H456", arrow: [384, 70, 0], text: [322, 44] },
  "check_valve reactor": { path: "M482 70H600V200", arrow: [600, 150, 90], text: [612, 64] },
  "check_valve inline_diffuser": { path: "M482 70H600V262", arrow: [600, 150, 90], text: [612, 64] },
  "check_valve diffuser": { path: "M482 70H1050V438", arrow: [760, 70, 0], text: [496, 60] },
  "tank filter": { path: "M772 440V175H712V500H346V456", arrow: [540, 500, 180], text: [368, 528] },
  "filter reactor": { path: "M346 326V218H578", arrow: [470, 218, 0], text: [384, 168] },
  "filter inline_diffuser": { path: "M346 326V218H600V262", arrow: [470, 218, 0], text: [384, 168] },
  "filter return": { path: "M346 326V218H660V140H840V232", arrow: [520, 218, 0], text: [384, 168] },
  "reactor return": { path: back, arrow: [660, 280, -90] },
  "inline_diffuser return": { path: "M600 330V430H660V140H840V232", arrow: [660, 280, -90] },
}

export const wideBox = "0 0 1120 610"

export function WideSchematic({
  schematic: { nodes, edges },
  reading,
}: {
  schematic: Schematic
  reading: Reading
}) {
  return (
    <>
      <Tank />
      {edges.map(({ from, to, medium, values }) => {
        const route = routes[`${from} ${to}`]
        if (!route) return null
        const [x, y, turn] = route.arrow
        return (
          <g key={`${from} ${to}`}>
            <Pipe path={route.path} medium={medium} arrow={{ x, y, turn }} />
            {route.text && <Lines reading={reading} x={route.text[0]} y={route.text[1]} values={values} />}
          </g>
        )
      })}
      {nodes.map(({ id, kind, label, values }) => {
        const { x, y, text } = places[kind]
        return (
          <g key={id}>
            {kind !== "tank" && (
              <g transform={`translate(${x} ${y})`} fill="var(--paper)" stroke="var(--ink)" strokeWidth={1.5}>
                {symbols[kind]}
              </g>
            )}
            <Lines reading={reading} x={text[0]} y={text[1]} anchor={text[2]} label={label} values={values} />
          </g>
        )
      })}
    </>
  )
}

function Tank() {
  return (
    <g fill="none">
      <path d="M740 450H1080V470H740Z" fill="var(--sunk)" />
      <path
        d="M740 222C742 232 748 234 760 234H1060C1072 234 1078 232 1080 222"
        stroke="var(--level-low)"
        strokeWidth={1.5}
      />
      <path d="M740 200V470H1080V200" stroke="var(--ink)" strokeWidth={2} />
    </g>
  )
}
