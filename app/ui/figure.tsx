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

/** How many figures stand side by side: as many as fit, unless a page knows better. */
const asManyAsFit = "grid-cols-[repeat(auto-fit,minmax(11rem,1fr))]"
export const closeColumns = "grid-cols-[repeat(auto-fit,minmax(9.5rem,1fr))]"

/** Figures side by side, divided by hairlines. */
export function FigureRow({ columns = asManyAsFit, children }: { columns?: string; children: ReactNode }) {
  // Each figure draws the rules above and before it; those at the edges lie outside and are cut off.
  return (
    <div className="overflow-hidden border-y border-line">
      <dl className={`-mt-px -ml-[17px] grid ${columns} [&>*]:border-t [&>*]:border-l [&>*]:px-4 [&>*]:py-4`}>
        {children}
      </dl>
    </div>
  )
}
