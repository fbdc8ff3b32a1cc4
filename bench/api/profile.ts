import { readdirSync, readFileSync } from "node:fs"
import path from "node:path"

interface CpuProfile {
  readonly nodes: { id: number; callFrame: { functionName: string; url: string }; children?: number[] }[]
  readonly samples: number[]
  readonly timeDeltas: number[]
}

/** Where the CPU time of a `--cpu-prof` run went, by package or folder, the largest first. */
export function profileShares(dir: string): { where: string; share: number }[] {
  const file = readdirSync(dir).find((name) => name.endsWith(".cpuprofile"))
  if (!file) throw new Error(`No CPU profile in ${dir}`)
  const profile = JSON.parse(readFileSync(path.join(dir, file), "utf8")) as CpuProfile
  const places = new Map(profile.nodes.map(({ id, callFrame }) => [id, placeOf(callFrame)]))
  const spent = new Map<string, number>()
  let busy = 0
  profile.samples.forEach((id, index) => {
    const place = places.get(id) ?? "?"
    const delta = profile.timeDeltas[index] ?? 0
    if (place === "(idle)" || delta < 0) return
    busy += delta
    spent.set(place, (spent.get(place) ?? 0) + delta)
  })
  return [...spent]
    .map(([where, time]) => ({ where, share: time / busy }))
    .sort((one, other) => other.share - one.share)
}

function placeOf({ functionName, url }: { functionName: string; url: string }): string {
  const parcel = /node_modules\/((?:@[^/]+\/)?[^/]+)/.exec(url)?.[1]
  if (parcel) return parcel
  if (url.startsWith("node:")) return url.split("/")[0] ?? url
  if (url === "") return functionName.startsWith("(") ? functionName : "native code"
  return path.relative(path.resolve(import.meta.dirname, "../.."), path.dirname(new URL(url).pathname))
}
