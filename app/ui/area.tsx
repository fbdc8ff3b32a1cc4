import Link from "next/link"
import type { ReactNode } from "react"
import type { Theme } from "@/app/theme"
import { type NavGroup, NavLinks } from "./nav-links"
import { QueryProvider } from "./query-provider"
import { ThemeSwitch } from "./theme-switch"
import { Wordmark } from "./wordmark"

/** The frame of a signed-in area: a head with its name, its pages at the side, the content. */
export function Area({
  name,
  mark,
  menuLabel,
  groups,
  person,
  theme,
  children,
}: {
  name: ReactNode
  mark?: ReactNode
  menuLabel: string
  groups: readonly NavGroup[]
  person: ReactNode
  theme: Theme
  children: ReactNode
}) {
  return (
    <div className="mx-auto flex min-h-dvh max-w-page flex-col px-5 has-data-wide:max-w-wide lg:px-10 print:max-w-none print:px-0">
      <header className="flex flex-wrap items-center justify-between gap-x-6 gap-y-2 border-b border-line py-4 print:hidden">
        <div className="flex min-w-0 flex-wrap items-center gap-x-5 gap-y-2">
          <Wordmark />
          <span aria-hidden="true" className="hidden h-6 border-l border-line sm:block" />
          <p className="truncate font-medium">{name}</p>
          {mark}
        </div>
        <div className="flex items-center gap-6 text-sm">
          <Link href="/docs" className="hover:text-action">
            Docs
          </Link>
          {person}
        </div>
      </header>
      <div className="grid grow gap-x-12 pt-6 pb-16 lg:grid-cols-[11rem_minmax(0,1fr)] lg:pt-10 print:block print:p-0">
        <div className="mb-8 print:hidden">
          <NavLinks label={menuLabel} groups={groups} />
        </div>
        <main id="main" className="min-w-0">
          <QueryProvider>{children}</QueryProvider>
        </main>
      </div>
      <footer className="flex flex-wrap justify-between gap-4 border-t border-line py-5 text-sm text-soft print:hidden">
        <ThemeSwitch chosen={theme} />
        <p>Times and periods are in UTC.</p>
      </footer>
    </div>
  )
}
