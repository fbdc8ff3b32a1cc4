"use client"

import { useState } from "react"
import { THEME_COOKIE, type Theme, themes } from "@/app/theme"

const words: Record<Theme, string> = { system: "As the device", light: "Light", dark: "Dark" }

/** Chooses the theme and remembers it for a year. */
export function ThemeSwitch({ chosen }: { chosen: Theme }) {
  const [theme, setTheme] = useState(chosen)

  function choose(next: Theme) {
    setTheme(next)
    const root = document.documentElement
    if (next === "system") delete root.dataset.theme
    else root.dataset.theme = next
    // biome-ignore lint/suspicious/noDocumentCookie: the Cookie Store API is not in every browser yet
    document.cookie = `${THEME_COOKIE}=${next}; path=/; max-age=31536000; samesite=lax`
  }

  return (
    <fieldset className="flex items-center gap-3 text-sm text-soft">
      <legend className="sr-only">Theme</legend>
      {themes.map((each) => (
        <label key={each} className="flex items-center gap-1.5 hover:text-ink has-checked:text-ink">
          <input
            type="radio"
            name="theme"
            checked={theme === each}
            onChange={() => choose(each)}
            className="size-3"
          />
          {words[each]}
        </label>
      ))}
    </fieldset>
  )
}
