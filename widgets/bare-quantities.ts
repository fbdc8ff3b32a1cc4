import { readFileSync } from "node:fs"
import type { Plugin } from "esbuild"

const words = /\b(description|ucum):\s*"(?:[^"\\]|\\.)*",?/g

/** Leaves the words of the quantities out of a bundle: a page needs their bounds and units, the document the rest. */
export const bareQuantities: Plugin = {
  name: "bare-quantities",
  setup({ onLoad }) {
    onLoad({ filter: /lib[\\/]units[\\/]quantities-\w+\.ts$/ }, ({ path: file }) => {
      const source = readFileSync(file, "utf8")
      const contents = source.replace(words, "")
      if (contents.includes("description:")) throw new Error(`${file}: a description was not recognised`)
      return { contents, loader: "ts" }
    })
  },
}
