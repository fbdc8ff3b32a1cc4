import type { ReactNode } from "react"
import { Button } from "./button"

/** What stands where a list will be: why it is empty and what fills it. */
export function Empty({
  title,
  children,
  action,
}: {
  title: string
  children: ReactNode
  action?: ReactNode
}) {
  return (
    <div className="border border-dashed border-edge px-6 py-10">
      <p className="text-lg font-semibold">{title}</p>
      <div className="mt-1 max-w-measure text-soft">{children}</div>
      {action && <div className="mt-5">{action}</div>}
    </div>
  )
}

/** Stands where data is being fetched; keeps the height so that nothing jumps. */
export function Loading({ label, rows = 4 }: { label: string; rows?: number }) {
  return (
    <div role="status">
      <span className="sr-only">{label}</span>
      <div aria-hidden="true" className="divide-y divide-line border-y border-line">
        {Array.from({ length: rows }, (_, row) => row).map((row) => (
          <div key={row} className="flex h-12 items-center gap-6">
            <div className="h-2 w-1/4 animate-pulse bg-line" />
            <div className="h-2 w-1/6 animate-pulse bg-line" />
            <div className="h-2 w-1/3 animate-pulse bg-line" />
          </div>
        ))}
      </div>
    </div>
  )
}

/** Stands where data could not be had: what happened and the way on. */
export function Failed({ detail, onRetry }: { detail: string; onRetry: () => void }) {
  return (
    <div role="alert" className="border-l-2 border-danger py-1 pl-4">
      <p className="font-semibold text-danger">This could not be loaded.</p>
      <p className="mt-1 max-w-measure">{detail}</p>
      <Button small className="mt-4" onClick={onRetry}>
        Try again
      </Button>
    </div>
  )
}
