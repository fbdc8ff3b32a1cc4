import type { ReactNode } from "react"

/** A number larger than its label, with its unit beside it and its interval, or what it is measured by, under it. */
export function Figure({
  label,
  value,
  unit,
  under,
}: {
  label: ReactNode
  value: ReactNode
  unit?: string
  under?: ReactNode
}) {
  return (
    <div>
      <dt className="text-sm text-soft">{label}</dt>
      <dd className="mt-1 font-mono text-2xl leading-tight font-medium tracking-tight">
        {value}
        {unit && <span className="ml-2 text-sm font-normal tracking-normal text-soft">{unit}</span>}
      </dd>
      {under && <dd className="mt-1 text-sm text-soft">{under}</dd>}
    </div>
  )
}

/** Figures side by side, divided by hairlines. */
export function FigureRow({ children }: { children: ReactNode }) {
  return (
    <dl className="grid grid-cols-[repeat(auto-fit,minmax(11rem,1fr))] gap-px overflow-hidden border-y border-line bg-line [&>*]:bg-paper [&>*]:py-4 [&>*]:pr-4 sm:[&>*:not(:first-child)]:pl-4">
      {children}
    </dl>
  )
}
