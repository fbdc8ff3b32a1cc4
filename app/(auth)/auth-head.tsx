import type { ReactNode } from "react"

/** The head of a page before the door. */
export function AuthHead({ title, children }: { title: string; children?: ReactNode }) {
  return (
    <header className="mb-8">
      <h1 className="text-3xl">{title}</h1>
      {children && <div className="mt-3 text-soft">{children}</div>}
    </header>
  )
}
