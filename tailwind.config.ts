import type { Config } from "tailwindcss"

/** Names of the design tokens for utility classes. The values are in app/tokens.css, once for each theme. */
export default {
  content: [],
  theme: {
    colors: {
      transparent: "transparent",
      current: "currentColor",
      paper: "var(--paper)",
      sunk: "var(--sunk)",
      field: "var(--field)",
      ink: "var(--ink)",
      soft: "var(--soft)",
      line: "var(--line)",
      edge: "var(--edge)",
      action: "var(--action)",
      "action-strong": "var(--action-strong)",
      "on-action": "var(--on-action)",
      warning: "var(--warning)",
      danger: "var(--danger)",
      "danger-strong": "var(--danger-strong)",
      "level-low": "var(--level-low)",
      "level-in-range": "var(--level-in-range)",
      "level-high": "var(--level-high)",
      "level-dangerous": "var(--level-dangerous)",
    },
    fontFamily: {
      sans: ["var(--font-text)"],
      mono: ["var(--font-figure)"],
    },
    borderRadius: { none: "0", DEFAULT: "2px", full: "9999px" },
    extend: {
      maxWidth: { measure: "42rem", page: "90rem", wide: "105rem" },
    },
  },
} satisfies Config
