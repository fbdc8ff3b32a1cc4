import { setTimeout as pause } from "node:timers/promises"
import { localDataDir } from "../stack/local-env"
import { isRunning, startCluster } from "../stack/postgres"
import { report, SetupError } from "../stack/progress"
import { type Stack, startStack } from "../stack/stack"
import { greeting } from "./greeting"

/** Runs the whole product until Ctrl-C or SIGTERM. `PORT` and `TARN_DATA_DIR` say where. */
export async function start(): Promise<void> {
  const ending = new AbortController()
  const end = (reason: string) => ending.abort(reason)
  for (const signal of ["SIGINT", "SIGTERM", "SIGHUP"] as const) process.on(signal, () => end(signal))

  let stack: Stack | undefined
  let problem: string | undefined
  try {
    stack = await startStack({
      dataDir: localDataDir(),
      port: portFrom(process.env.PORT),
      signal: ending.signal,
      restart: true,
      onGone(what) {
        problem = what
        end("a process is gone")
      },
    })
    process.stdout.write(greeting(stack.addresses))
    await keepDatabase(stack, ending.signal)
  } catch (error) {
    if (!ending.signal.aborted) problem = describe(error)
  }
  if (problem) report(problem)
  report(`ending (${problem ? "failed" : ending.signal.reason})`)
  await stack?.stop()
  report("ended: no process is left, the data stays")
  process.exit(problem ? 1 : 0)
}

/** Returns when the signal comes; until then starts the database again should it die. */
async function keepDatabase({ addresses: { cluster } }: Stack, signal: AbortSignal): Promise<void> {
  while (!signal.aborted) {
    await pause(2_000, undefined, { signal }).catch(() => {})
    if (signal.aborted || isRunning(cluster)) continue
    report("PostgreSQL is gone: starting it again")
    await startCluster(cluster)
  }
}

function portFrom(text: string | undefined): number {
  const port = Number(text ?? 3000)
  if (!Number.isInteger(port) || port < 1 || port > 65_535) {
    throw new SetupError(`PORT must be a number from 1 to 65535, not “${text}”.`)
  }
  return port
}

function describe(error: unknown): string {
  if (error instanceof SetupError) return error.message
  return error instanceof Error ? (error.stack ?? error.message) : String(error)
}
