import type { ReactorAnswer } from "@/lib/flow/reactor-verdict"

const states = [
  { at: 0, name: "clean" },
  { at: 0.3, name: "loaded" },
  { at: 0.7, name: "due" },
  { at: 1, name: "blocked" },
] as const

/** The state of the media at which the reactor gas-locks, on the scale from clean to blocked. */
export function CloggingScale({ reactor }: { reactor: ReactorAnswer }) {
  const { limit, limit_clogging, minimum_flow_l_h } = reactor
  const at = limit === "reached" || limit === "already" ? (limit_clogging ?? 0) : undefined
  const words = {
    reached: `It gas-locks at a clogging of ${limit_clogging?.toFixed(2)}, when the flow is down to ${minimum_flow_l_h.toFixed(0)} L/h.`,
    already: `Even with clean media the flow is below the ${minimum_flow_l_h.toFixed(0)} L/h that it takes: it gas-locks at once.`,
    never: "It does not gas-lock: the gas under its lid dissolves by itself at this feed.",
    beyond: "Even blocked media leave enough flow: it does not gas-lock on this scale.",
  }[limit]
  return (
    <figure>
      <figcaption className="text-sm">{words}</figcaption>
      <svg aria-hidden="true" viewBox="0 0 600 52" className="mt-2 w-full max-w-xl font-mono text-[11px]">
        <path d="M30 22H570" stroke="var(--ink)" strokeWidth={1.5} />
        {at !== undefined && (
          <rect
            x={30 + 540 * at}
            y={14}
            width={540 * (1 - at)}
            height={8}
            fill="var(--danger)"
            fillOpacity={0.35}
          />
        )}
        {states.map(({ at: place, name }) => (
          <g key={name}>
            <path d={`M${30 + 540 * place} 16v12`} stroke="var(--ink)" />
            <text x={30 + 540 * place} y={44} textAnchor="middle" className="fill-soft">
              {name} {place}
            </text>
          </g>
        ))}
        {at !== undefined && <path d={`M${30 + 540 * at} 20l-6 -12h12z`} fill="var(--danger)" />}
      </svg>
    </figure>
  )
}
