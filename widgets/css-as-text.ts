import { readFileSync } from "node:fs"
import path from "node:path"
import { type Plugin, transform } from "esbuild"

/** `import css from "./x.css?text"` gives the minified style sheet as a string. */
export const cssAsText: Plugin = {
  name: "css-as-text",
  setup({ onResolve, onLoad }) {
    onResolve({ filter: /\.css\?text$/ }, ({ path: wanted, resolveDir }) => ({
      path: path.join(resolveDir, wanted.replace("?text", "")),
      namespace: "css-as-text",
    }))
    onLoad({ filter: /.*/, namespace: "css-as-text" }, async ({ path: file }) => {
      const { code } = await transform(readFileSync(file, "utf8"), { loader: "css", minify: true })
      return { contents: code.trim(), loader: "text", watchFiles: [file] }
    })
  },
}
