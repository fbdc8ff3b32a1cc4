import type { Schematic, SchematicEdge, SchematicNode } from "@/lib/plan/schematic"
import { LINE_PX, Lines } from "./lines"
import { Pipe } from "./pipe"
import { symbols } from "./symbols"

const axis = 84
const textX = 142
const loopX = 16

/** Height of a symbol above and below its middle, in the narrow drawing. */
const reach: Record<SchematicNode["kind"], number> = {
  cylinder: 58,
  reducer: 22,
  solenoid: 28,
  check_valve: 20,
  reactor: 98,
  inline_diffuser: 36,
  diffuser: 48,
  filter: 66,
  return: 14,
  tank: 70,
}

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
    const half = Math.max(reach[node.kind], ((node.values.length + 1) * LINE_PX) / 2)
    const gap = into === undefined ? 0 : Math.max(24, into.values.length * LINE_PX + 26)
    const y = bottom + gap + half
    rows.push({ node, y, into })
    bottom = y + half
    into = edges.find(({ from, to }) => from === node.id && !rows.some((row) => row.node.id === to))
    current = nodes.find(({ id }) => id === into?.to)
  }
  return { rows, height: bottom + 26 }
}

export function NarrowSchematic({ schematic }: { schematic: Schematic }) {
  const { rows, height } = narrowLayout(schematic)
  const last = rows.at(-1)
  const closing = schematic.edges.find(({ from }) => from === last?.node.id)
  const closed = rows.find(({ node }) => node.id === closing?.to)
  return (
    <>
      {rows.map(({ node, y, into }, index) => {
        const above = rows[index - 1]
        if (!above || !into) return null
        const from = above.y + reach[above.node.kind]
        const to = y - reach[node.kind]
        return (
          <g key={node.id}>
            <Pipe
              path={`M${axis} ${from}V${to}`}
              medium={into.medium}
              arrow={{ x: axis, y: (from + to) / 2, turn: 90 }}
            />
            <Lines
              x={textX}
              y={gapMiddle(above, y, node) - ((into.values.length - 1) * LINE_PX) / 2 + 4}
              values={into.values}
            />
          </g>
        )
      })}
      {last && closing && closed && (
        <>
          <Pipe
            path={`M${axis} ${last.y + reach[last.node.kind]}V${height - 8}H${loopX}V${closed.y - reach[closed.node.kind] - 10}H${axis}`}
            medium={closing.medium}
            arrow={{ x: loopX, y: (last.y + closed.y) / 2, turn: -90 }}
          />
          <Lines x={axis + 14} y={height - 4} values={closing.values} />
        </>
      )}
      {rows.map(({ node, y }) => (
        <g key={node.id}>
          <g transform={`translate(${axis} ${y})`} fill="var(--paper)" stroke="var(--ink)" strokeWidth={1.5}>
            {node.kind === "tank" ? <SmallTank /> : symbols[node.kind]}
          </g>
          <Lines
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
  const half = ({ kind, values }: SchematicNode) => Math.max(reach[kind], ((values.length + 1) * LINE_PX) / 2)
  return (above.y + half(above.node) + y - half(node)) / 2
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
