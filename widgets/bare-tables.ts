import { readFileSync } from "node:fs"
import path from "node:path"
import { type BuildOptions, build, type Plugin } from "esbuild"

/** The tables of the engine that a page needs little of: quantities with their bounds, and sources. */
const tables = /lib[\\/](units[\\/]quantities-\w+|chemistry[\\/]sources-\w+)\.ts$/
/** A row of such a table, whether it stands on one line or on several. */
const row = /^ {2}(\w+): \{(?: .*\},?|\n(?: {4}.*\n)* {2}\},?)\n/gm
/** A comment names a source without needing it. What only looks like one, in a text, begins no line. */
const comments = /^\s*(?:\/\/.*|\/\*\*[\s\S]*?\*\/)$/gm
const words = /\b(?:description|ucum):\s*"(?:[^"\\]|\\.)*",?/g

/**
 * Leaves out of a bundle the rows of the tables that no other file of it names, and the words of the quantities: the
 * document of the API needs them all, a calculator few.
 */
export async function bareTables(options: BuildOptions): Promise<Plugin> {
  const { metafile } = await build({ ...options, metafile: true, write: false })
  const root = options.absWorkingDir ?? ""
  const files = Object.keys(metafile!.inputs).filter((file) => /\.tsx?$/.test(file) && !tables.test(file))
  const code = files
    .map((file) => readFileSync(path.join(root, file), "utf8").replace(comments, ""))
    .join("\n")
  const named = new Set(code.match(/\w+/g))
  return {
    name: "bare-tables",
    setup({ onLoad }) {
      onLoad({ filter: tables }, ({ path: file }) => ({
        contents: bareTable(readFileSync(file, "utf8"), named, file),
        loader: "ts",
      }))
    },
  }
}

function bareTable(source: string, named: ReadonlySet<string>, file: string): string {
  if (/^ {2}\w/m.test(source.replace(row, ""))) throw new Error(`${file}: a row was not recognised`)
  const rows = source.replace(row, (text, name: string) => (named.has(name) ? text : ""))
  return file.includes("quantities") ? rows.replace(words, "") : rows
}
