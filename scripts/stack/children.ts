/** Starts the processes of the product, waits for each to be ready, restarts one that dies, and ends them all. */
import { type ChildProcess, spawn } from "node:child_process"
import { createWriteStream, readFileSync, type WriteStream } from "node:fs"
import path from "node:path"
import { pathToFileURL } from "node:url"
import { environment } from "./environment"
import { type Report, SetupError } from "./progress"

export interface ChildSpec {
  name: string
  /** A TypeScript file of the project, run through tsx. */
  script: string
  env: Record<string, string>
  /** Ready when this address answers 200; without one, when the process prints a line that begins with `ready`. */
  health?: string
}

export interface ChildOptions {
  root: string
  logDir: string
  report: Report
  /** Start a child again when it dies; three deaths within a minute end it for good and call `onGone`. */
  restart: boolean
  onGone: (problem: string) => void
  /** Aborting it ends a child that is not ready yet. */
  signal: AbortSignal
}

export interface Child {
  name: string
  /** The process id of the moment; it changes when the child is started again. */
  readonly pid: number | undefined
  stop: () => Promise<void>
}

const READY_WITHIN_MS = 120_000
const STOP_WITHIN_MS = 28_000

/**
 * Starts one process and resolves when it is ready.
 *
 * @throws SetupError with the end of its log when it dies or says nothing within two minutes.
 */
export async function startChild(spec: ChildSpec, options: ChildOptions): Promise<Child> {
  const logFile = path.join(options.logDir, `${spec.name}.log`)
  const log = createWriteStream(logFile, { flags: "a", mode: 0o600 })
  const deaths: number[] = []
  let stopping = false
  let current = launch(spec, options.root, log)

  const watch = (process: ChildProcess) => {
    process.once("exit", (code, signal) => {
      if (stopping || process !== current) return
      const how = signal ? `was ended by ${signal}` : `ended with code ${code}`
      deaths.push(Date.now())
      const recent = deaths.filter((at) => at > Date.now() - 60_000).length
      if (!options.restart || recent >= 3) {
        options.onGone(`${spec.name} ${how}. The end of its log (${logFile}):\n${tail(logFile)}`)
        return
      }
      options.report(`${spec.name} ${how}: starting it again`)
      setTimeout(() => {
        if (stopping) return
        current = launch(spec, options.root, log)
        watch(current)
      }, 500)
    })
  }

  const child: Child = {
    name: spec.name,
    get pid() {
      return current.pid
    },
    async stop() {
      stopping = true
      await end(current)
      log.end()
    },
  }
  try {
    await ready(spec, current, logFile, options.signal)
  } catch (error) {
    await child.stop()
    throw error
  }
  watch(current)
  return child
}

function launch(spec: ChildSpec, root: string, log: WriteStream): ChildProcess {
  const leash = pathToFileURL(path.join(root, "scripts/stack/leash.mjs")).href
  const child = spawn(process.execPath, ["--import", leash, "--import", "tsx", spec.script], {
    cwd: root,
    env: environment(spec.env),
    stdio: ["ignore", "pipe", "pipe", "ipc"],
    // A group of its own: Ctrl-C in a terminal reaches the start command alone, which ends its children in order.
    detached: true,
  })
  child.stdout?.pipe(log, { end: false })
  child.stderr?.pipe(log, { end: false })
  return child
}

async function ready(
  spec: ChildSpec,
  child: ChildProcess,
  logFile: string,
  signal: AbortSignal,
): Promise<void> {
  const giveUp = Date.now() + READY_WITHIN_MS
  let saidReady = false
  let output = ""
  child.stdout?.on("data", (chunk: Buffer) => {
    if (saidReady) return
    output += chunk
    saidReady = /^ready\b/m.test(output)
  })
  while (Date.now() < giveUp) {
    signal.throwIfAborted()
    if (child.exitCode !== null || child.signalCode !== null) {
      throw new SetupError(`${spec.name} ended before it was ready (log: ${logFile}):\n${tail(logFile)}`)
    }
    if (spec.health ? await answers(spec.health) : saidReady) return
    await new Promise((resolve) => setTimeout(resolve, 50))
  }
  throw new SetupError(`${spec.name} was not ready within two minutes (log: ${logFile}):\n${tail(logFile)}`)
}

async function answers(address: string): Promise<boolean> {
  try {
    const response = await fetch(address, { signal: AbortSignal.timeout(2_000) })
    await response.arrayBuffer()
    return response.status === 200
  } catch {
    return false
  }
}

async function end(child: ChildProcess): Promise<void> {
  if (child.pid === undefined || child.exitCode !== null || child.signalCode !== null) return
  const gone = new Promise((resolve) => child.once("exit", resolve))
  child.kill("SIGTERM")
  const hard = setTimeout(() => process.kill(-child.pid!, "SIGKILL"), STOP_WITHIN_MS)
  await gone
  clearTimeout(hard)
}

function tail(file: string): string {
  return readFileSync(file, "utf8").trimEnd().split("\n").slice(-15).join("\n")
}
