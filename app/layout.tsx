import "@fontsource-variable/martian-mono/wdth.css"
import "@fontsource-variable/schibsted-grotesk/wght.css"
import type { Metadata, Viewport } from "next"
import { cookies } from "next/headers"
import type { ReactNode } from "react"
import "./globals.css"
import { themeOf } from "./theme"

export const metadata: Metadata = {
  title: { template: "%s · Tarnwright", default: "Tarnwright: CO2 calculations for planted aquariums" },
  description:
    "CO2 level, controller set-point, gas, lead time, flow and cylinder life for planted aquariums: a metered JSON API, widgets for shops, and a portal.",
}

export const viewport: Viewport = {
  themeColor: [
    { media: "(prefers-color-scheme: light)", color: "#f6f4ec" },
    { media: "(prefers-color-scheme: dark)", color: "#0e1714" },
  ],
}

export default async function RootLayout({ children }: { children: ReactNode }) {
  const theme = themeOf(await cookies())
  return (
    <html lang="en" data-theme={theme === "system" ? undefined : theme}>
      <body>
        <a
          href="#main"
          className="sr-only focus:not-sr-only focus:fixed focus:top-2 focus:left-2 focus:z-50 focus:bg-ink focus:px-4 focus:py-2 focus:text-paper"
        >
          Skip to the content
        </a>
        {children}
      </body>
    </html>
  )
}
