import { execFileSync } from "node:child_process"
import { existsSync, mkdtempSync, readFileSync, rmSync } from "node:fs"
import { tmpdir } from "node:os"
import path from "node:path"
import { parseArgs } from "node:util"
import { closePools } from "@/db"
import { type Stack, startStack } from "@/scripts/stack/stack"
import { type BenchKey, createBenchKeys } from "./api/accounts"
import { type Load, load, type Target } from "./api/load"
import { type Started, start, startBareApp } from "./api/processes"
import { profileShares } from "./api/profile"

/** Enough accounts that their rates together are above what a machine can serve. */
const accounts = 300
const flatOver_calls = 200_000
const body = { ph: 6.8, kh_dkh: 4 }

const names = ["ceiling", "next", "metered", "batch"] as const
type Name = (typeof names)[number]

/**
 * What a metered call costs, side by side in one sitting, on loopback, 20 connections: (a) the ceiling, (b) a bare App
 * Router handler, (c) a call through the API lane of server.ts, (d) a batch of 100.
 *
 *     npm run bench -- api [--json] [--seconds 5] [--rounds 5]
 */
export async function run(args: readonly string[]): Promise<void> {
  const { values } = parseArgs({
    args: [...args],
    options: {
      json: { type: "boolean", default: false },
      seconds: { type: "string", default: "5" },
      rounds: { type: "string", default: "5" },
    },
  })
  const seconds = Number(values.seconds)
  installLoadGenerator()
  const dir = mkdtempSync(path.join(tmpdir(), "bench-api-"))
  const stack = await startStack({
    dataDir: path.join(dir, "data"),
    port: 0,
    report: values.json ? () => {} : undefined,
  })
  const started: Started[] = []
  try {
    Object.assign(process.env, stack.addresses.settings)
    const keys = await createBenchKeys(accounts)
    await closePools()
    const targets = await startTargets(stack, keys, started)
    const loads = await measure(targets, { seconds, rounds: Number(values.rounds), dir })
    const memory = await memoryOver(stack, targets.metered, { seconds, dir })
    const profile = await profileOf(stack, targets.metered, { seconds, dir })
    report({ loads, memory, profile }, values.json)
  } finally {
    for (const each of started) await each.stop()
    await stack.stop()
    rmSync(dir, { recursive: true, force: true })
  }
}

function installLoadGenerator(): void {
  if (existsSync("/usr/bin/wrk")) return
  const options = ["-o", "DPkg::Lock::Timeout=300", "install", "-y", "--no-install-recommends", "wrk"]
  execFileSync("apt-get", options, { stdio: "ignore" })
}

async function startTargets(
  stack: Stack,
  keys: readonly BenchKey[],
  started: Started[],
): Promise<Record<Name, Target>> {
  const secrets = keys.map(({ secret }) => secret)
  const api = `${stack.addresses.appUrl}/api/v1`
  const settings = {
    ...stack.addresses.settings,
    ANSWER_BYTES: `${await bytesOf(`${api}/carbonate/co2`, secrets[0] ?? "")}`,
    KEYS: keys.map(({ secret, account_id, key_id }) => `${secret} ${account_id} ${key_id}`).join("\n"),
  }
  const ceiling = await start(["--import", "tsx", "bench/api/ceiling.ts"], settings)
  started.push(ceiling)
  const bare = await startBareApp(settings)
  started.push(bare)
  const calls = Array.from({ length: 100 }, (_, index) => ({ id: `${index}`, path: "/carbonate/co2", body }))
  return {
    ceiling: { url: `${ceiling.url}/`, body, secrets },
    next: { url: `${bare.url}/bare`, body, secrets },
    metered: { url: `${api}/carbonate/co2`, body, secrets },
    batch: { url: `${api}/batch`, body: { calls }, secrets },
  }
}

interface Sitting {
  readonly seconds: number
  readonly dir: string
}

/** Rounds in which each target has its turn, after one that warms up. */
async function measure(
  targets: Record<Name, Target>,
  { seconds, rounds, dir }: Sitting & { rounds: number },
): Promise<Record<Name, Load[]>> {
  const loads: Record<Name, Load[]> = { ceiling: [], next: [], metered: [], batch: [] }
  for (let round = 0; round <= rounds; round++) {
    for (const name of names) {
      const measured = await load(targets[name], { seconds, dir })
      if (round === 0) continue
      if (measured.failed > 0) throw new Error(`${measured.failed} calls of ${name} failed`)
      loads[name].push(measured)
    }
  }
  return loads
}

interface Memory {
  readonly calls: number
  readonly growth_mb: number
}

/** Resident memory of the web process at the start and the end of many calls. */
async function memoryOver(stack: Stack, target: Target, { dir }: Sitting): Promise<Memory> {
  const pid = stack.children.get("web")?.pid
  const resident_mb = () =>
    Number(/VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${pid}/status`, "utf8"))?.[1]) / 1024
  const before_mb = resident_mb()
  const end = Date.now() + 300_000
  let calls = 0
  while (calls < flatOver_calls && Date.now() < end)
    calls += (await load(target, { seconds: 5, dir })).requests
  return { calls, growth_mb: resident_mb() - before_mb }
}

/** The API lane alone, under a CPU profile. */
async function profileOf(stack: Stack, target: Target, { seconds, dir }: Sitting) {
  const profileDir = path.join(dir, "profile")
  const lane = await start(["--cpu-prof", `--cpu-prof-dir=${profileDir}`, "--import", "tsx", "server.ts"], {
    ...stack.addresses.settings,
    TARN_API_ONLY: "1",
    PORT: "0",
  })
  await load({ ...target, url: `${lane.url}/api/v1/carbonate/co2` }, { seconds, dir })
  await lane.stop()
  return profileShares(profileDir).slice(0, 12)
}

function report(
  found: { loads: Record<Name, Load[]>; memory: Memory; profile: { where: string; share: number }[] },
  json: boolean,
): void {
  const { loads, memory, profile } = found
  const of = (name: Name, figure: keyof Load) => median(loads[name].map((each) => each[figure]))
  const result = {
    metered_vs_ceiling: of("metered", "requests_per_s") / of("ceiling", "requests_per_s"),
    metered_vs_next: of("metered", "requests_per_s") / of("next", "requests_per_s"),
    batch_ratio: (of("batch", "requests_per_s") * 100) / of("metered", "requests_per_s"),
    p99_vs_ceiling: of("metered", "p99_ms") / of("ceiling", "p99_ms"),
    ...Object.fromEntries(names.map((name) => [`${name}_per_s`, of(name, "requests_per_s")])),
    memory,
    profile,
  }
  if (json) {
    console.log(JSON.stringify(result))
    return
  }
  const row = (name: Name, what: string) => {
    const [rate, p50, p99] = (["requests_per_s", "p50_ms", "p99_ms"] as const).map((figure) =>
      of(name, figure),
    )
    console.log(
      `${what.padEnd(52)}${rate?.toFixed(0).padStart(7)}/s  p50 ${p50?.toFixed(2)} ms  p99 ${p99?.toFixed(2)} ms`,
    )
  }
  row("ceiling", "(a) node:http, zod, key in memory, group commit")
  row("next", "(b) a bare App Router handler")
  row("metered", "(c) /carbonate/co2 through server.ts")
  row("batch", "(d) /batch of 100")
  console.log(`(c) / (a)                  ${result.metered_vs_ceiling.toFixed(2)}   target at least 0.60`)
  console.log(`(c) / (b)                  ${result.metered_vs_next.toFixed(2)}   target at least 6`)
  console.log(`p99 of (c) / p99 of (a)    ${result.p99_vs_ceiling.toFixed(2)}   target at most 3`)
  console.log(`calculations (d) / (c)     ${result.batch_ratio.toFixed(1)}   target at least 15`)
  console.log(`memory over ${memory.calls} calls: ${memory.growth_mb.toFixed(1)} MB more`)
  console.log("CPU of (c) by where it is spent:")
  for (const { where, share } of profile) console.log(`  ${(share * 100).toFixed(1).padStart(5)} %  ${where}`)
}

async function bytesOf(url: string, secret: string): Promise<number> {
  const response = await fetch(url, {
    method: "POST",
    headers: { authorization: `Bearer ${secret}`, "content-type": "application/json" },
    body: JSON.stringify(body),
  })
  if (!response.ok) throw new Error(`${url} answers ${response.status}`)
  return (await response.arrayBuffer()).byteLength
}

function median(values: readonly number[]): number {
  const sorted = [...values].sort((one, other) => one - other)
  return sorted[Math.floor(sorted.length / 2)] ?? Number.NaN
}
