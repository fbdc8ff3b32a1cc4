import type { Metadata } from "next"
import { cookies } from "next/headers"
import type { ReactNode } from "react"
import { themeOf } from "@/app/theme"
import { ThemeSwitch } from "@/app/ui/theme-switch"
import { Wordmark } from "@/app/ui/wordmark"

// The address of these pages may hold a one-time token: no other site may learn it from a link.
export const metadata: Metadata = { referrer: "no-referrer", robots: "noindex" }

export default async function AuthLayout({ children }: { children: ReactNode }) {
  return (
    <div className="mx-auto flex min-h-dvh max-w-md flex-col px-5">
      <header className="py-8">
        <Wordmark />
      </header>
      <main id="main" className="grow py-8">
        {children}
      </main>
      <footer className="border-t border-line py-5">
        <ThemeSwitch chosen={themeOf(await cookies())} />
      </footer>
    </div>
  )
}
