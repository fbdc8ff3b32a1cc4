import type { ReactNode } from "react"

/** The head of a page: what it is, in one sentence what it is for, and what can be done. */
export function PageHead({ title, lead, actions }: { title: string; lead?: ReactNode; actions?: ReactNode }) {
  return (
    <header className="flex flex-wrap items-end justify-between gap-x-8 gap-y-4 pb-8">
      <div className="max-w-measure">
        <h1 className="text-3xl">{title}</h1>
        {lead && <p className="mt-2 text-soft">{lead}</p>}
      </div>
      {actions && <div className="flex flex-wrap gap-3">{actions}</div>}
    </header>
  )
}

/** One part of a page: its title and its side note stand in the margin, as on a datasheet. */
export function Section({
  title,
  note,
  id,
  children,
}: {
  title: string
  note?: ReactNode
  id?: string
  children: ReactNode
}) {
  return (
    <section
      id={id}
      className="grid gap-x-10 gap-y-4 border-t border-line py-8 xl:grid-cols-[12rem_minmax(0,1fr)]"
    >
      <div>
        <h2 className="text-lg">{title}</h2>
        {note && <div className="mt-2 max-w-measure text-sm text-soft">{note}</div>}
      </div>
      <div className="min-w-0">{children}</div>
    </section>
  )
}
