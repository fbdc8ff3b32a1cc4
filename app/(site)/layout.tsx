import { cookies } from "next/headers"
import Link from "next/link"
import type { ReactNode } from "react"
import { currentSession } from "@/app/session"
import { themeOf } from "@/app/theme"
import { ButtonLink } from "@/app/ui/button"
import { ThemeSwitch } from "@/app/ui/theme-switch"
import { Wordmark } from "@/app/ui/wordmark"

const pages = [
  { href: "/docs", label: "Docs" },
  { href: "/plans", label: "Plans" },
  { href: "/status", label: "Status" },
  { href: "/changelog", label: "Changes" },
]

export default async function SiteLayout({ children }: { children: ReactNode }) {
  const session = await currentSession()
  return (
    <div className="mx-auto flex min-h-dvh max-w-page flex-col px-5 lg:px-10">
      <header className="flex flex-wrap items-center justify-between gap-x-8 gap-y-3 border-b border-line py-4">
        <Wordmark />
        <nav
          aria-label="Site"
          className="order-last flex w-full flex-wrap gap-x-6 gap-y-2 sm:order-none sm:w-auto"
        >
          {pages.map(({ href, label }) => (
            <Link key={href} href={href} className="py-1 hover:text-action">
              {label}
            </Link>
          ))}
        </nav>
        <div className="flex items-center gap-3">
          {session ? (
            <ButtonLink small look="primary" href="/portal">
              Portal
            </ButtonLink>
          ) : (
            <>
              <ButtonLink small look="quiet" href="/signin">
                Sign in
              </ButtonLink>
              <ButtonLink small look="primary" href="/signup">
                Open an account
              </ButtonLink>
            </>
          )}
        </div>
      </header>
      <main id="main" className="grow py-12">
        {children}
      </main>
      <footer className="space-y-4 border-t border-line py-6 text-sm text-soft">
        <p className="max-w-measure">
          Tarnwright informs; it replaces neither the manual of the equipment, nor local codes, nor licensed
          practice. CO2 can kill livestock and, in a closed room, people.
        </p>
        <ThemeSwitch chosen={themeOf(await cookies())} />
      </footer>
    </div>
  )
}
