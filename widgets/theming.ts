/** A custom property of CSS that a page may set on `tarnwright-widget` or around it. Part of the widgets' contract. */
export interface ThemeProperty {
  readonly name: `--tarn-${string}`
  /** What stands where the page sets nothing, in the light and the dark scheme. */
  readonly light: string
  readonly dark: string
  readonly meaning: string
}

const inherit = { light: "inherit", dark: "inherit" }

export const themeProperties: readonly ThemeProperty[] = [
  { name: "--tarn-paper", light: "#f6f4ec", dark: "#0e1714", meaning: "Background" },
  { name: "--tarn-field", light: "#fdfcf7", dark: "#0a110f", meaning: "Background of a field" },
  { name: "--tarn-ink", light: "#10211c", dark: "#e8eae0", meaning: "Text and marks" },
  { name: "--tarn-soft", light: "#4b5b53", dark: "#a5b1a8", meaning: "Labels and side notes" },
  { name: "--tarn-line", light: "#cfd0c2", dark: "#2c3a34", meaning: "Rules between things" },
  { name: "--tarn-edge", light: "#7b8379", dark: "#6f7e75", meaning: "Outlines of fields and plots" },
  { name: "--tarn-action", light: "#1f6b4a", dark: "#6cc198", meaning: "Sliders, links and buttons" },
  { name: "--tarn-on-action", light: "#fdfcf7", dark: "#0e1714", meaning: "Text on a button" },
  {
    name: "--tarn-focus",
    light: "--tarn-action",
    dark: "--tarn-action",
    meaning: "Outline of what has focus",
  },
  { name: "--tarn-warning", light: "#8a5600", dark: "#e0a540", meaning: "Word and mark of a caution" },
  { name: "--tarn-danger", light: "#a3281f", dark: "#f0897c", meaning: "Word and mark of a danger" },
  { name: "--tarn-low", light: "#2f6fb0", dark: "#6aa5e0", meaning: "Level: low" },
  { name: "--tarn-in-range", light: "#3f8f4f", dark: "#6cba78", meaning: "Level: in range" },
  { name: "--tarn-high", light: "#d3b021", dark: "#e0c24a", meaning: "Level: high" },
  { name: "--tarn-radius", light: "2px", dark: "2px", meaning: "Radius of corners" },
  { name: "--tarn-pad", light: "20px", dark: "20px", meaning: "Space inside the outline" },
  { name: "--tarn-size", light: "1rem", dark: "1rem", meaning: "Size of the text; all else follows it" },
  { name: "--tarn-font", ...inherit, meaning: "Family of the text" },
  { name: "--tarn-figure-font", ...inherit, meaning: "Family of figures" },
]

/** Names that a page may style through `tarnwright-widget::part(…)`. Part of the widgets' contract. */
export const parts = [
  ...["widget", "header", "title", "notice", "button", "footer", "link", "ask"],
  ...["inputs", "field", "label", "slider", "number", "unit", "problem", "measured"],
  ...["outcome", "figure", "level", "ruler", "sentence", "set-point", "cautions", "caution", "map", "method"],
] as const
