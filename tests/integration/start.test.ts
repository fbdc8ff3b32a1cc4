import { type ChildProcess, execFile, spawn } from "node:child_process"
import { mkdirSync, mkdtempSync, readdirSync, readFileSync, rmSync } from "node:fs"
import { createServer, type Server } from "node:net"
import path from "node:path"
import { promisify } from "node:util"
import { afterAll, afterEach, beforeAll, describe, expect, it } from "vitest"
import { freePort } from "@/scripts/stack/ports"
import { removeCluster } from "@/scripts/stack/postgres"

const root = path.resolve(import.meta.dirname, "../..")
const shell = promisify(execFile)

let dataDir: string
const launched: Running[] = []

beforeAll(() => {
  mkdirSync(path.join(root, ".data"), { recursive: true })
  dataDir = mkdtempSync(path.join(root, ".data/test-start-"))
})

afterEach(async () => {
  for (const { process: each, ended } of launched.splice(0)) {
    each.kill("SIGTERM")
    await ended
  }
})

afterAll(() => {
  removeCluster(dataDir)
  rmSync(dataDir, { recursive: true, force: true })
})

describe("npm start", () => {
  it("gives a first answer, ends without a process left, and is back with its data within 20 s", async () => {
    const port = await freePort()
    const first = await started(port)
    const call = first.output().match(/^ {2}(curl .+)$/m)![1]!
    const answer = JSON.parse((await shell("sh", ["-c", call])).stdout)
    expect(answer.result.co2_mg_l).toBeGreaterThan(0)
    await endsCleanly(first)

    const began = Date.now()
    const second = await started(port)
    expect(Date.now() - began).toBeLessThan(20_000)
    expect(second.output()).toContain("demo world: kept from the last run")
    expect(second.output().match(/^ {2}(curl .+)$/m)![1]).toBe(call)
    expect(JSON.parse((await shell("sh", ["-c", call])).stdout).result).toEqual(answer.result)
    await endsCleanly(second)
  }, 300_000)

  it("recovers from a run that was killed and left its database running", async () => {
    const killed = await started(await freePort())
    killed.process.kill("SIGKILL")
    const again = await started(await freePort())
    expect(again.output()).toContain("demo world: kept from the last run")
    await endsCleanly(again)
  }, 300_000)

  it("names the port when it is busy, and starts nothing", async () => {
    const other = await listening()
    const port = (other.address() as { port: number }).port
    const { code, output } = await run(port)
    other.close()
    expect(code).toBe(1)
    expect(output).toContain(`Port ${port} is busy. Set PORT to another one`)
  }, 60_000)

  it("refuses a PORT that is none", async () => {
    const { code, output } = await run("harbour")
    expect(code).toBe(1)
    expect(output).toContain("PORT must be a number from 1 to 65535, not “harbour”.")
  }, 60_000)
})

interface Running {
  process: ChildProcess
  output: () => string
  ended: Promise<number | null>
}

function launch(port: number | string): Running {
  const process_ = spawn("node", ["scripts/start.mjs"], {
    cwd: root,
    env: {
      PATH: process.env.PATH,
      HOME: process.env.HOME,
      PORT: String(port),
      TARN_DATA_DIR: dataDir,
    } as never,
    stdio: ["ignore", "pipe", "pipe"],
  })
  let text = ""
  const keep = (chunk: Buffer) => {
    text += chunk
  }
  process_.stdout.on("data", keep)
  process_.stderr.on("data", keep)
  const ended = new Promise<number | null>((resolve) => process_.once("close", resolve))
  const running = { process: process_, output: () => text, ended }
  launched.push(running)
  return running
}

/** Resolves when the first call is printed; rejects with the output when the command ends before. */
async function started(port: number): Promise<Running> {
  const running = launch(port)
  let ended = false
  running.ended.then(() => {
    ended = true
  })
  while (!running.output().includes("Bearer tarn_server_sandbox_")) {
    if (ended) throw new Error(running.output())
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  return running
}

async function run(port: number | string): Promise<{ code: number | null; output: string }> {
  const running = launch(port)
  return { code: await running.ended, output: running.output() }
}

async function endsCleanly({ process: parent, ended, output }: Running): Promise<void> {
  const postmaster = Number.parseInt(readFileSync(path.join(dataDir, "postgres/postmaster.pid"), "utf8"), 10)
  const family = [...descendants(parent.pid!), postmaster, ...descendants(postmaster)]
  expect(family.length).toBeGreaterThan(6)
  parent.kill("SIGTERM")
  expect(await ended).toBe(0)
  expect(output()).toContain("ended: no process is left, the data stays")
  expect(family.filter(lives)).toEqual([])
}

/** Processes below one, as /proc tells it. */
function descendants(pid: number): number[] {
  const parents = readdirSync("/proc")
    .filter((name) => /^\d+$/.test(name))
    .flatMap((name) => {
      try {
        const stat = readFileSync(`/proc/${name}/stat`, "utf8")
        return [{ pid: Number(name), parent: Number(stat.slice(stat.lastIndexOf(")") + 2).split(" ")[1]) }]
      } catch {
        return []
      }
    })
  const below = (top: number): number[] =>
    parents.filter(({ parent }) => parent === top).flatMap((each) => [each.pid, ...below(each.pid)])
  return below(pid)
}

function lives(pid: number): boolean {
  try {
    // A process that has ended and was not waited for yet is in state Z.
    const stat = readFileSync(`/proc/${pid}/stat`, "utf8")
    return stat.slice(stat.lastIndexOf(")") + 2, stat.lastIndexOf(")") + 3) !== "Z"
  } catch {
    return false
  }
}

function listening(): Promise<Server> {
  return new Promise((resolve) => {
    const server = createServer()
    server.listen(0, "127.0.0.1", () => resolve(server))
  })
}
