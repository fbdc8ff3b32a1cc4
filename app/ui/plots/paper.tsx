import type { ReactNode } from "react"

/** The area of a plot that its curves are drawn in, in CSS pixels. */
export interface Frame {
  readonly left: number
  readonly top: number
  readonly width: number
  readonly height: number
}

export interface Axis {
  readonly scale: (value: number) => number
  readonly ticks: readonly number[]
  /** What it measures, with the unit. */
  readonly title: string
  readonly write?: (value: number) => string
}

const plain = (value: number) => value.toLocaleString("en")

/** The upright axis: its title stands over it, a hairline goes out from each tick. */
export function UprightAxis({ frame, axis }: { frame: Frame; axis: Axis }) {
  const { scale, ticks, title, write = plain } = axis
  return (
    <>
      <text x={0} y={frame.top - 12} className="fill-ink">
        {title}
      </text>
      {ticks.map((tick) => (
        <g key={tick}>
          <path
            d={`M${frame.left} ${scale(tick).toFixed(1)}H${frame.left + frame.width}`}
            stroke="var(--line)"
          />
          <text x={frame.left - 8} y={scale(tick) + 4} textAnchor="end" className="fill-soft">
            {write(tick)}
          </text>
        </g>
      ))}
    </>
  )
}

/** The level axis: its title stands under its right end. */
export function LevelAxis({ frame, axis }: { frame: Frame; axis: Axis }) {
  const { scale, ticks, title, write = plain } = axis
  const foot = frame.top + frame.height
  return (
    <>
      <path d={`M${frame.left} ${foot}H${frame.left + frame.width}`} stroke="var(--ink)" />
      {ticks.map((tick) => (
        <g key={tick}>
          <path d={`M${scale(tick).toFixed(1)} ${foot}v5`} stroke="var(--ink)" />
          <text x={scale(tick)} y={foot + 19} textAnchor="middle" className="fill-soft">
            {write(tick)}
          </text>
        </g>
      ))}
      <text x={frame.left + frame.width} y={foot + 36} textAnchor="end" className="fill-ink">
        {title}
      </text>
    </>
  )
}

/** A path through points, broken nowhere. */
export function pathOf(points: readonly (readonly [x: number, y: number])[]): string {
  return `M${points.map(([x, y]) => `${x.toFixed(1)} ${y.toFixed(1)}`).join("L")}`
}

/** One thing to read off a plot, with a name for whoever does not see it. */
export function Mark({
  x,
  y,
  name,
  look = "full",
}: {
  x: number
  y: number
  name: string
  look?: "full" | "hollow" | "cross"
}) {
  return (
    <svg role="img" aria-label={name} x={x.toFixed(1)} y={y.toFixed(1)} overflow="visible">
      <title>{name}</title>
      {look === "cross" ? (
        <path d="M-8 0H8M0 -8V8" stroke="var(--ink)" strokeWidth={1.5} />
      ) : (
        <circle
          r={4.5}
          fill={look === "full" ? "var(--ink)" : "var(--paper)"}
          stroke="var(--ink)"
          strokeWidth={1.5}
        />
      )}
    </svg>
  )
}

/** What a line or an area of a plot stands for. */
export interface Key {
  readonly label: string
  readonly dash?: string
  readonly colour?: string
  readonly area?: boolean
}

/** A plot with its key under it and its values as a table one click away. */
export function PlotFigure({
  title,
  keys = [],
  table,
  children,
}: {
  title: string
  keys?: readonly Key[]
  table: { readonly columns: readonly string[]; readonly rows: readonly (readonly string[])[] }
  children: ReactNode
}) {
  return (
    <figure aria-label={title}>
      {children}
      {keys.length > 0 && (
        <ul className="mt-1 flex flex-wrap gap-x-5 gap-y-1 text-sm text-soft">
          {keys.map(({ label, dash, colour = "var(--ink)", area }) => (
            <li key={label} className="flex items-center gap-2">
              <svg aria-hidden="true" width="24" height="10">
                {area ? (
                  <rect width="24" height="10" fill={colour} />
                ) : (
                  <path d="M0 5H24" stroke={colour} strokeWidth={2} strokeDasharray={dash} />
                )}
              </svg>
              {label}
            </li>
          ))}
        </ul>
      )}
      <details className="mt-2 text-sm print:hidden">
        <summary className="link">As a table</summary>
        <div className="mt-2">
          <table className="w-full text-left">
            <caption className="sr-only">{title}</caption>
            <thead>
              <tr className="text-soft">
                {table.columns.map((column) => (
                  <th key={column} scope="col" className="py-1 pr-4 font-medium">
                    {column}
                  </th>
                ))}
              </tr>
            </thead>
            <tbody className="font-mono">
              {table.rows.map(([head = "", ...cells]) => (
                <tr key={head} className="border-t border-line">
                  <th scope="row" className="py-1 pr-4 font-normal">
                    {head}
                  </th>
                  {cells.map((cell, index) => (
                    <td key={table.columns[index + 1]} className="py-1 pr-4">
                      {cell}
                    </td>
                  ))}
                </tr>
              ))}
            </tbody>
          </table>
        </div>
      </details>
    </figure>
  )
}
