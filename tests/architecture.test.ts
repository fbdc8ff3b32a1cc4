import { readdirSync, readFileSync } from "node:fs"
import { dirname, join, relative, resolve } from "node:path"
import ts from "typescript"
import { describe, expect, it } from "vitest"

const root = resolve(import.meta.dirname, "..")
const skipped = new Set(["node_modules", ".git", ".next", ".data", "dist", "vendor", "coverage", "tmp"])

/** Which of our own folders or files, and which packages, the files of a room may import. The first row that fits counts. */
const rooms: { room: RegExp; ours: RegExp; packages: RegExp | "any" }[] = [
  { room: /^lib\/(units|numeric)\//, ours: /^lib\/(units|numeric)\//, packages: /^$/ },
  { room: /^lib\/chemistry\//, ours: /^lib\/(units|numeric|chemistry)\//, packages: /^$/ },
  { room: /^lib\/gas\//, ours: /^lib\/(units|numeric|chemistry|gas)\//, packages: /^$/ },
  { room: /^lib\/flow\//, ours: /^lib\/(units|numeric|chemistry|gas|flow)\//, packages: /^$/ },
  { room: /^lib\/plan\//, ours: /^lib\/(units|numeric|chemistry|gas|flow|plan)\//, packages: /^$/ },
  {
    room: /^lib\/api\/(define-|problem|quantity|router|rate-headers|request|field-errors|tags)/,
    ours: /^lib\/(api|units|chemistry\/(answer|engine-version)|errors|context)/,
    packages: /^zod$/,
  },
  {
    room: /^lib\/api\/next-mount/,
    ours: /^lib\/(api|env)/,
    packages: /^(next|node:)/,
  },
  {
    room: /^lib\/api\//,
    ours: /^lib\/(api|keys\/index|usage\/index|billing\/plans|units|chemistry\/engine-version|errors|context|id)/,
    packages: /^(zod|ipaddr\.js|node:.*)$/,
  },
  {
    room: /^lib\//,
    ours: /^(lib\/(?!api\/)|db\/)/,
    packages: /^(?!next$|next\/|react$|react-dom|react\/)/,
  },
  { room: /^server\.ts$/, ours: /^(app\/api\/v1\/registry|lib\/api\/)/, packages: "any" },
  {
    room: /^app\/api\/v1\/registry/,
    ours: /^(app\/api\/v1\/.*\/operation|lib\/api\/define-operation)/,
    packages: /^$/,
  },
  {
    room: /^app\/api\/v1\/.*operation\.ts$/,
    // The one that sets a report on paper asks a thread for it.
    ours: /^(lib|openapi\/openapi\.json|app\/api\/v1\/|app\/report\/pdf\/render)/,
    packages: /^zod$/,
  },
  {
    room: /^app\/api\/v1\/.*route\.ts$/,
    ours: /^(app\/api\/v1\/registry|lib\/api\/next-mount)/,
    packages: /^$/,
  },
  {
    room: /^app\//,
    ours: /^(app|lib|widgets|openapi)\//,
    packages: /^(?!kysely|pg$|stripe$)/,
  },
  {
    room: /^openapi\//,
    ours: /^(openapi|app\/api\/v1\/registry|lib\/(api\/(define-operation|problem|tags)|chemistry\/engine-version|errors|webhooks\/index))/,
    packages: "any",
  },
  {
    room: /^widgets\//,
    ours: /^(widgets|lib\/(units|numeric|chemistry|gas|flow|plan))\//,
    packages: /^(?!next)/,
  },
  { room: /^db\//, ours: /^(db\/|lib\/env)/, packages: /^(kysely|pg)$/ },
  { room: /^migrations\//, ours: /^$/, packages: /^kysely$/ },
]

interface Import {
  readonly from: string
  readonly to: string
  readonly ours: boolean
}

const files = sourceFiles(root)
const imports = files.flatMap(importsOf)

describe("the arrows of the house", () => {
  it("reads the tree", () => {
    expect(files.length).toBeGreaterThan(50)
    expect(imports.length).toBeGreaterThan(100)
  })

  it("lead only where a room may look", () => {
    const strays = imports.filter(({ from, to, ours }) => {
      const rule = rooms.find(({ room }) => room.test(from))
      if (!rule) return false
      if (ours) return !rule.ours.test(to)
      return rule.packages !== "any" && !rule.packages.test(to)
    })
    expect(strays.map(({ from, to }) => `${from} → ${to}`)).toEqual([])
  })

  it("reach a verb's folder through its index only", () => {
    const verbs =
      /^lib\/(keys|usage|accounts|team|exports|closing|reports|enquiries|catalog|widgets|webhooks|audit|mail)\//
    const strays = imports.filter(({ from, to }) => {
      const room = verbs.exec(to)?.[1]
      return (
        room &&
        !from.startsWith(`lib/${room}/`) &&
        !from.startsWith("tests/") &&
        !to.startsWith(`lib/${room}/index`)
      )
    })
    expect(strays.map(({ from, to }) => `${from} → ${to}`)).toEqual([])
  })

  it("run in no circle between the folders of lib", () => {
    const edges = new Map<string, Set<string>>()
    for (const { from, to, ours } of imports) {
      const [one, other] = [libFolder(from), libFolder(to)]
      if (ours && one && other && one !== other) edges.set(one, (edges.get(one) ?? new Set()).add(other))
    }
    expect(circleIn(edges)).toBeUndefined()
  })
})

describe("the files of the house", () => {
  it("hold at most 400 lines, tables and generated files apart", () => {
    const long = files
      .filter((file) => !/\.generated\.|^lib\/units\/quantities|^migrations\/|^tests\//.test(file))
      .filter((file) => readFileSync(join(root, file), "utf8").split("\n").length > 400)
    expect(long).toEqual([])
  })

  it("are three lines where they are a route of the API", () => {
    const routes = files.filter((file) => /^app\/api\/v1\/.*route\.ts$/.test(file))
    expect(routes.length).toBeGreaterThan(3)
    for (const file of routes) {
      expect(readFileSync(join(root, file), "utf8").trim().split("\n"), file).toHaveLength(3)
    }
  })

  it("name every operation in the registry, each with its route", () => {
    const registry = readFileSync(join(root, "app/api/v1/registry.ts"), "utf8")
    const operations = files.filter((file) => /^app\/api\/v1\/.*operation\.ts$/.test(file))
    for (const file of operations) {
      expect(registry, file).toContain(file.slice("app/api/v1/".length, -".ts".length))
      expect(files, file).toContain(file.replace("operation.ts", "route.ts"))
    }
  })
})

function sourceFiles(folder: string): string[] {
  return readdirSync(folder, { withFileTypes: true }).flatMap((entry) => {
    if (skipped.has(entry.name)) return []
    const path = join(folder, entry.name)
    if (entry.isDirectory()) return sourceFiles(path)
    return /\.(ts|tsx|mts)$/.test(entry.name) && !entry.name.endsWith(".d.ts") ? [relative(root, path)] : []
  })
}

function importsOf(file: string): Import[] {
  const { importedFiles } = ts.preProcessFile(readFileSync(join(root, file), "utf8"), true, true)
  return importedFiles
    .map(({ fileName }) => {
      if (fileName.startsWith("@/")) return { from: file, to: fileName.slice(2), ours: true }
      if (!fileName.startsWith(".")) return { from: file, to: fileName, ours: false }
      const to = relative(root, resolve(root, dirname(file), fileName))
      const parcel = /^node_modules\/(.+)/.exec(to)?.[1]
      return parcel ? { from: file, to: parcel, ours: false } : { from: file, to, ours: true }
    })
    .map((each) =>
      each.ours && /^(lib\/\w+|db)$/.test(each.to) && isFolder(each.to)
        ? { ...each, to: `${each.to}/index` }
        : each,
    )
}

function isFolder(path: string): boolean {
  return files.some((file) => file.startsWith(`${path}/`))
}

function libFolder(path: string): string | undefined {
  return /^lib\/([^/]+)\//.exec(path)?.[1]
}

function circleIn(edges: Map<string, Set<string>>): string[] | undefined {
  function from(node: string, path: string[]): string[] | undefined {
    if (path.includes(node)) return [...path.slice(path.indexOf(node)), node]
    for (const next of edges.get(node) ?? []) {
      const circle = from(next, [...path, node])
      if (circle) return circle
    }
    return undefined
  }
  for (const node of edges.keys()) {
    const circle = from(node, [])
    if (circle) return circle
  }
  return undefined
}
