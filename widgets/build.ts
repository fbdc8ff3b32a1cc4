/**
 * Builds the widgets into `public/w`:
 *
 *     /w/<version>/<hash>/<part>.js   never changes; the loader verifies it by its integrity
 *     /w/<version>/<hash>/loader.js   the same loader for pages that pin it, with the integrity in the manifest
 *     /w/v1/loader.js                 what most pages load; it names the parts above
 *     /w/v1/embed.js, react.js        for the framed form, and the React component
 *     /w/manifest.json                addresses, integrity and sizes, for the snippet that the portal shows
 *
 * Parts of earlier builds stay, since a page may still hold the loader that names them. Exits with 1 when something
 * is larger than its budget.
 */
import { createHash } from "node:crypto"
import { mkdirSync, readFileSync, writeFileSync } from "node:fs"
import path from "node:path"
import { gzipSync } from "node:zlib"
import { type BuildOptions, build } from "esbuild"
import { bareQuantities } from "./bare-quantities"
import { cssAsText } from "./css-as-text"
import { languages } from "./shared/locale"
import type { Address } from "./shared/mount"

const root = path.resolve(import.meta.dirname, "..")
const outDir = path.join(root, "public/w")
const { version } = JSON.parse(readFileSync(path.join(root, "package.json"), "utf8")) as { version: string }

/** Budgets in bytes after gzip. @source PLATFORM 4.6 */
const budgets = { loader: 2_000, widget: 35_000, catalogue: 4_000 }
const calculators = ["co2-level"]

interface Built {
  readonly name: string
  readonly path: string
  readonly integrity: string
  readonly bytes: number
  readonly gzip_bytes: number
}

const parts: Built[] = [pinned("frame", await bundle("widgets/frame.ts"))]
const catalogues: Built[] = []
const ask = await withCatalogues("ask", {})
for (const calculator of calculators)
  await withCatalogues(calculator, { ASK: JSON.stringify(addressOf(ask)) })
const addresses = Object.fromEntries(parts.map((part) => [part.name, addressOf(part)]))
const loader = await bundle("widgets/loader.ts", { define: { PARTS: JSON.stringify(addresses) } })
const builtLoader = pinned("loader", loader)

write("v1/loader.js", loader)
write("v1/embed.js", await bundle("widgets/embed.ts"))
write(
  "v1/react.js",
  await bundle("widgets/react.tsx", { alias: {}, external: ["react", "react/jsx-runtime"] }),
)
write("manifest.json", JSON.stringify({ version, loader: builtLoader, parts, catalogues }, null, 2))

const isTooLarge =
  builtLoader.gzip_bytes > budgets.loader ||
  parts.some(({ gzip_bytes }) => builtLoader.gzip_bytes + gzip_bytes > budgets.widget) ||
  catalogues.some(({ gzip_bytes }) => gzip_bytes > budgets.catalogue)
for (const { name, bytes, gzip_bytes, path } of [builtLoader, ...parts, ...catalogues]) {
  console.log(
    `${name.padEnd(18)} ${String(bytes).padStart(7)} B  ${String(gzip_bytes).padStart(6)} B gzip  ${path}`,
  )
}
if (isTooLarge) {
  console.error(`Larger than its budget (bytes after gzip): ${JSON.stringify(budgets)}`)
  process.exitCode = 1
}

async function bundle(entry: string, options: BuildOptions = {}): Promise<string> {
  const { outputFiles } = await build({
    absWorkingDir: root,
    entryPoints: [entry],
    bundle: true,
    write: false,
    format: "esm",
    target: "es2022",
    minify: true,
    jsx: "automatic",
    legalComments: "inline",
    alias: {
      react: "preact/compat",
      "react-dom/client": "preact/compat/client",
      "react/jsx-runtime": "preact/jsx-runtime",
    },
    plugins: [cssAsText, bareQuantities],
    ...options,
  })
  return outputFiles![0]!.text
}

/** Builds a part and its catalogues, which it loads by the addresses that are put into it. */
async function withCatalogues(name: string, define: Record<string, string>): Promise<Built> {
  const own: Record<string, Address> = {}
  for (const language of languages) {
    const catalogue = pinned(`${name}.${language}`, await bundle(`widgets/${name}/messages/${language}.ts`))
    own[language] = addressOf(catalogue)
    catalogues.push(catalogue)
  }
  const code = await bundle(`./widgets/${name}`, { define: { ...define, CATALOGUES: JSON.stringify(own) } })
  const part = pinned(name, code)
  parts.push(part)
  return part
}

function addressOf({ path, integrity }: Built): Address {
  return [path, integrity]
}

/** Writes a file under an address that holds its own hash. */
function pinned(name: string, code: string): Built {
  const digest = createHash("sha384").update(code).digest()
  const place = `${version}/${digest.toString("hex").slice(0, 16)}/${name}.js`
  write(place, code)
  return {
    name,
    path: `/w/${place}`,
    integrity: `sha384-${digest.toString("base64")}`,
    bytes: Buffer.byteLength(code),
    gzip_bytes: gzipSync(code, { level: 9 }).length,
  }
}

function write(place: string, text: string): void {
  const file = path.join(outDir, place)
  mkdirSync(path.dirname(file), { recursive: true })
  writeFileSync(file, text)
}
