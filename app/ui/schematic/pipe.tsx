/** A gas line is one line, a water pipe two; the arrow points the way of the flow. */
export function Pipe({
  path,
  medium,
  arrow,
}: {
  path: string
  medium: "gas" | "water"
  arrow: { readonly x: number; readonly y: number; readonly turn: number }
}) {
  return (
    <g fill="none">
      {medium === "water" && <path d={path} stroke="var(--ink)" strokeWidth={9} strokeLinejoin="round" />}
      <path
        d={path}
        stroke={medium === "water" ? "var(--paper)" : "var(--ink)"}
        strokeWidth={medium === "water" ? 6 : 1.5}
        strokeLinejoin="round"
      />
      <path
        d="M-4 -4.5L3 0L-4 4.5"
        transform={`translate(${arrow.x} ${arrow.y}) rotate(${arrow.turn})`}
        stroke={medium === "water" ? "var(--level-low)" : "var(--action)"}
        strokeWidth={1.75}
      />
    </g>
  )
}
