import type { cookies } from "next/headers"

export const themes = ["system", "light", "dark"] as const
export type Theme = (typeof themes)[number]

/** Cookie that remembers the choice; not bound to a session, since it is the browser's. */
export const THEME_COOKIE = "tarn-theme"

/** The remembered theme; `system` when there is none. */
export function themeOf(jar: Awaited<ReturnType<typeof cookies>>): Theme {
  const value = jar.get(THEME_COOKIE)?.value
  return themes.find((theme) => theme === value) ?? "system"
}
