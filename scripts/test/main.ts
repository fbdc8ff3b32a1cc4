import { cpSync, mkdirSync, mkdtempSync, rmSync } from "node:fs"
import path from "node:path"
import { removeCluster } from "../stack/postgres"
import { report } from "../stack/progress"
import { type Stack, startStack } from "../stack/stack"
import { runVitest, type Tally } from "./vitest"

const root = path.resolve(import.meta.dirname, "../..")

/**
 * Runs the whole suite on a stack of its own and ends with `N passed, N failed`, alone on the last line. A count is
 * printed only when every test file was run to its end. `filters` narrow the run to files, as vitest takes them.
 */
export async function test(filters: readonly string[]): Promise<void> {
  const ending = new AbortController()
  for (const signal of ["SIGINT", "SIGTERM"] as const) process.once(signal, () => ending.abort(signal))

  const base = path.join(root, ".data")
  mkdirSync(base, { recursive: true })
  const dataDir = mkdtempSync(path.join(base, "test-"))
  let tally: Tally | undefined
  try {
    tally = await runAll(dataDir, filters, ending.signal)
  } catch (error) {
    report(ending.signal.aborted ? `stopped by ${ending.signal.reason}` : describe(error))
  }
  if (!tally || tally.failed > 0) keepLogs(dataDir, path.join(base, "failed-test-logs"))
  removeCluster(dataDir)
  rmSync(dataDir, { recursive: true, force: true })
  if (tally) {
    if (tally.skipped > 0) report(`${tally.skipped} skipped`)
    process.stdout.write(`${tally.passed} passed, ${tally.failed} failed\n`)
  }
  process.exit(tally && tally.failed === 0 ? 0 : 1)
}

/** Units first, which need nothing; then the rest, one file at a time, on one stack. */
async function runAll(dataDir: string, filters: readonly string[], signal: AbortSignal): Promise<Tally> {
  const run = { root, dataDir, filters, signal }
  const units = await runVitest({ ...run, projects: ["unit"], env: {} })
  let stack: Stack | undefined
  try {
    stack = await startStack({ dataDir, port: 0, signal })
    const env = { TARN_TEST_STACK: JSON.stringify(stack.addresses) }
    const others = await runVitest({ ...run, projects: ["integration", "browser"], env })
    return {
      passed: units.passed + others.passed,
      failed: units.failed + others.failed,
      skipped: units.skipped + others.skipped,
    }
  } finally {
    await stack?.stop()
  }
}

function keepLogs(dataDir: string, place: string): void {
  rmSync(place, { recursive: true, force: true })
  try {
    cpSync(path.join(dataDir, "logs"), place, { recursive: true })
    report(`the logs of the processes are in ${path.relative(root, place)}`)
  } catch {
    // The run ended before there was a log.
  }
}

function describe(error: unknown): string {
  return error instanceof Error ? error.message : String(error)
}
