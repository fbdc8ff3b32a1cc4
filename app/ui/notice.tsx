import type { ReactNode } from "react"
import { CautionMark, InfoMark } from "./marks"

type Severity = "info" | "warning" | "danger"

const tones: Record<Severity, string> = {
  info: "border-edge text-soft",
  warning: "border-warning text-warning",
  danger: "border-danger text-danger",
}

/** Something to know beside what it concerns. A `live` one is read out when it appears. */
export function Notice({
  severity = "info",
  title,
  children,
  live = false,
}: {
  severity?: Severity
  title?: string
  children: ReactNode
  live?: boolean
}) {
  const Mark = severity === "info" ? InfoMark : CautionMark
  return (
    <div role={live ? "alert" : undefined} className={`flex gap-3 border-l-2 py-1 pl-4 ${tones[severity]}`}>
      <Mark className="mt-1 size-4" />
      <div className="min-w-0">
        {title && <p className="font-semibold">{title}</p>}
        <div className="max-w-measure text-ink">{children}</div>
      </div>
    </div>
  )
}
