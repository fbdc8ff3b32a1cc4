import type { ReactNode } from "react"
import { NavLinks } from "@/app/ui/nav-links"
import { docsMenu } from "./menu"

export default function DocsLayout({ children }: { children: ReactNode }) {
  return (
    <div className="grid gap-x-12 gap-y-8 lg:grid-cols-[11rem_minmax(0,1fr)]">
      <div>
        <NavLinks label="Documentation" groups={docsMenu} />
      </div>
      <div className="min-w-0">{children}</div>
    </div>
  )
}
