/** How much of a quota is used: a scale with marks, as on a vessel, read at its level. */
export function Gauge({ used, cap, label }: { used: number; cap: number; label: string }) {
  const share = cap > 0 ? Math.min(1, used / cap) : 1
  const percent = Math.floor(share * 100)
  const tone = share >= 1 ? "text-danger" : share >= 0.8 ? "text-warning" : "text-action"
  const reading = `${label}: ${used.toLocaleString("en")} of ${cap.toLocaleString("en")} units, ${percent} %`
  return (
    <div>
      <svg
        role="img"
        aria-label={reading}
        viewBox="0 0 1000 24"
        preserveAspectRatio="none"
        className={`h-6 w-full ${tone}`}
      >
        <rect x="0" y="10" width={Math.max(share * 1000, used > 0 ? 2 : 0)} height="13" fill="currentColor" />
        <path
          d="M0 23.5H1000M0.5 4V24M999.5 4V24M250 14V24M500 9V24M750 14V24"
          stroke="var(--edge)"
          fill="none"
          vectorEffect="non-scaling-stroke"
        />
        <path
          d="M800 4V24"
          stroke="var(--warning-mark)"
          strokeDasharray="2 2"
          vectorEffect="non-scaling-stroke"
        />
      </svg>
      <div className="mt-1 flex justify-between font-mono text-xs text-soft">
        <span>0</span>
        <span>{cap.toLocaleString("en")}</span>
      </div>
    </div>
  )
}
