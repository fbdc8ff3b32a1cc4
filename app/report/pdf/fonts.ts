import path from "node:path"
import { Font } from "@react-pdf/renderer"

const folder = path.join(process.cwd(), "node_modules/@fontsource")

const file = (family: string, letters: string, weight: number) =>
  path.join(folder, family, "files", `${family}-${letters}-${weight}-normal.woff`)

/** The app's two faces, each with the letters beyond western Europe behind it, in which the names of sources stand. */
export const text = ["Schibsted Grotesk", "Schibsted Grotesk, more letters"]
export const mono = ["Martian Mono", "Martian Mono, more letters"]

// Registered once for the process; a sheet is set in nothing else.
for (const [[latin = "", more = ""], family, weights] of [
  [text, "schibsted-grotesk", [400, 600, 700]],
  [mono, "martian-mono", [400, 500]],
] as const) {
  for (const fontWeight of weights) {
    Font.register({ family: latin, src: file(family, "latin", fontWeight), fontWeight })
    Font.register({ family: more, src: file(family, "latin-ext", fontWeight), fontWeight })
  }
}
// Words are short and columns wide enough: a word is never cut.
Font.registerHyphenationCallback((word) => [word])
