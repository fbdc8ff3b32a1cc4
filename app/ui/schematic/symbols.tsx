import type { ReactNode } from "react"
import type { NodeKind } from "@/lib/plan/schematic"

const BUBBLES = [
  [-8, -70],
  [9, -52],
  [-2, -34],
  [-12, -14],
  [10, 2],
  [0, 24],
] as const

/** Symbols of our own, drawn about the origin in plain lines. The tank is drawn by the layouts, to their own size. */
export const symbols: Record<Exclude<NodeKind, "tank">, ReactNode> = {
  cylinder: (
    <>
      <path d="M-8 -42V-50H8V-42M-8 -42C-30 -38 -32 -28 -32 -16V44H32V-16C32 -28 30 -38 8 -42Z" />
      <path d="M-32 -8H32M-32 36H32" strokeWidth={0.75} />
      <path d="M0 -50V-58M-9 -58H9" />
    </>
  ),
  reducer: (
    <>
      <circle r={20} />
      <path d="M0 0L10 -11M-13 9A16 16 0 1 1 13 9" strokeWidth={1} />
    </>
  ),
  solenoid: (
    <>
      <path d="M-20 10L20 -6V10L-20 -6Z" />
      <path d="M0 2V-12M-12 -30H12V-12H-12ZM-12 -12L12 -30" />
    </>
  ),
  check_valve: <path d="M-14 -12V12L12 0ZM12 -12V12" />,
  reactor: (
    <>
      <path d="M-24 -96H24V96H-24Z M-32 -96H32M-32 96H32" />
      <Bubbles at={BUBBLES} />
    </>
  ),
  inline_diffuser: (
    <>
      <path d="M-12 -34H12V34H-12ZM-12 12H12" />
      <Bubbles at={BUBBLES.slice(0, 4).map(([x, y]) => [x / 2.6, y / 4 - 8] as const)} />
    </>
  ),
  diffuser: (
    <>
      <path d="M-18 0H18L12 9H-12Z" />
      <Bubbles at={BUBBLES.slice(0, 5).map(([x, y]) => [x, y / 1.6 - 44] as const)} />
    </>
  ),
  filter: (
    <>
      <path d="M-40 -56H40V64H-40ZM-46 -66H46V-56H-46Z" />
      <path d="M-32 -30H32M-32 0H32M-32 30H32" strokeWidth={0.75} />
      <path
        d="M-32 22L-24 30M-20 14L-4 30M-4 10L16 30M12 10L32 30M-32 -8L-24 0M-16 -20L4 0M4 -20L24 0"
        strokeWidth={0.75}
      />
    </>
  ),
  return: <path d="M-10 -6C-4 -6 -4 2 -10 8H10C4 2 4 -6 10 -6" />,
}

function Bubbles({ at }: { at: readonly (readonly [number, number])[] }) {
  return at.map(([x, y]) => <circle key={`${x} ${y}`} cx={x} cy={y} r={3.2} strokeWidth={1} />)
}
