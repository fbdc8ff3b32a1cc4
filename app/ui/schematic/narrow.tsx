import type { NodeKind, Schematic, SchematicEdge, SchematicNode } from "@/lib/plan/schematic"
import type { Reading } from "@/lib/units/format"
import { isWorthDrawing, LINE_PX, Lines } from "./lines"
import { Pipe } from "./pipe"
import { symbols } from "./symbols"

const axis = 84
const textX = 136
const loopX = 16

/** How far a symbol reaches from its middle, and where lines join it above and below, in the narrow drawing. */
const shapes: Record<NodeKind, { readonly half: number; readonly up: number; readonly down: number }> = {
  cylinder: { half: 58, up: 58, down: 44 },
  reducer: { half: 20, up: 20, down: 20 },
  solenoid: { half: 20, up: 20, down: 20 },
  check_valve: { half: 14, up: 14, down: 12 },
  reactor: { half: 96, up: 96, down: 96 },
  inline_diffuser: { half: 34, up: 34, down: 34 },
  diffuser: { half: 92, up: 0, down: 9 },
  filter: { half: 66, up: 66, down: 64 },
  return: { half: 12, up: 6, down: 8 },
  tank: { half: 60, up: 60, down: 60 },
}

/** Drawn for a line that runs across; here lines run down. */
const turned: readonly NodeKind[] = ["solenoid", "check_valve"]

interface Row {
  readonly node: SchematicNode
  readonly y: number
  readonly into: SchematicEdge | undefined
}

/** One under another: the gas from the cylinder down to the device, then the water around, back up at the left. */
export function narrowLayout({ nodes, edges }: Schematic): { rows: readonly Row[]; height: number } {
  const rows: Row[] = []
  let bottom = 6
  let current = nodes.find(({ kind }) => kind === "cylinder")
  let into: SchematicEdge | undefined
  while (current && !rows.some(({ node }) => node === current)) {
    const node: SchematicNode = current
    const half = halfOf(node)
    const gap = into === undefined ? 0 : Math.max(24, drawnOf(into) * LINE_PX + 26)
    const y = bottom + gap + half
    rows.push({ node, y, into })
    bottom = y + half
    into = edges.find(({ from, to }) => from === node.id && !rows.some((row) => row.node.id === to))
    current = nodes.find(({ id }) => id === into?.to)
  }
  const closing = edges.find(({ from }) => from === rows.at(-1)?.node.id)
  return { rows, height: bottom + 26 + (closing ? drawnOf(closing) : 0) * LINE_PX }
}

export function NarrowSchematic({ schematic, reading }: { schematic: Schematic; reading: Reading }) {
  const { rows } = narrowLayout(schematic)
  const last = rows.at(-1)
  const foot = last ? last.y + halfOf(last.node) + 18 : 0
  const closing = schematic.edges.find(({ from }) => from === last?.node.id)
  const closed = rows.find(({ node }) => node.id === closing?.to)
  return (
    <>
      {rows.map(({ node, y, into }, index) => {
        const above = rows[index - 1]
        if (!above || !into) return null
        const from = above.y + shapes[above.node.kind].down
        const to = y - shapes[node.kind].up
        return (
          <g key={node.id}>
            <Pipe
              path={`M${axis} ${from}V${to}`}
              medium={into.medium}
              arrow={{ x: axis, y: (from + to) / 2, turn: 90 }}
            />
            <Lines
              reading={reading}
              x={textX}
              y={gapMiddle(above, y, node) - ((drawnOf(into) - 1) * LINE_PX) / 2 + 4}
              values={into.values}
            />
          </g>
        )
      })}
      {last && closing && closed && (
        <>
          <Pipe
            path={`M${axis} ${last.y + shapes[last.node.kind].down}V${foot}H${loopX}V${closed.y - shapes[closed.node.kind].up - 10}H${axis}`}
            medium={closing.medium}
            arrow={{ x: loopX, y: (last.y + closed.y) / 2, turn: -90 }}
          />
          <Lines reading={reading} x={axis + 14} y={foot + 4} values={closing.values} />
        </>
      )}
      {rows.map(({ node, y }) => (
        <g key={node.id}>
          <g
            transform={`translate(${axis} ${y})${turned.includes(node.kind) ? " rotate(90)" : ""}`}
            fill="var(--paper)"
            stroke="var(--ink)"
            strokeWidth={1.5}
          >
            {node.kind === "tank" ? <SmallTank /> : symbols[node.kind]}
          </g>
          <Lines
            reading={reading}
            x={textX}
            y={y - (node.values.length * LINE_PX) / 2 + 4}
            label={node.label}
            values={node.values}
          />
        </g>
      ))}
    </>
  )
}

function gapMiddle(above: Row, y: number, node: SchematicNode): number {
  return (above.y + halfOf(above.node) + y - halfOf(node)) / 2
}

function halfOf({ kind, values }: SchematicNode): number {
  return Math.max(shapes[kind].half, ((values.length + 1) * LINE_PX) / 2)
}

function drawnOf({ values }: SchematicEdge): number {
  return values.filter(isWorthDrawing).length
}

function SmallTank() {
  return (
    <>
      <path d="M-46 -60V60H46V-60" fill="none" strokeWidth={2} />
      <path d="M-46 46H46V60H-46Z" fill="var(--sunk)" stroke="none" />
      <path
        d="M-46 -46C-45 -40 -42 -38 -36 -38H36C42 -38 45 -40 46 -46"
        fill="none"
        stroke="var(--level-low)"
      />
    </>
  )
}
