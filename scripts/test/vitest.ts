import { spawn } from "node:child_process"
import { existsSync, readFileSync } from "node:fs"
import path from "node:path"
import { SetupError } from "../stack/progress"

export interface Tally {
  passed: number
  failed: number
  skipped: number
}

export interface VitestRun {
  root: string
  dataDir: string
  projects: readonly string[]
  filters: readonly string[]
  env: Record<string, string>
  signal: AbortSignal
}

/** The part of vitest's JSON report that counts. */
interface Report {
  numPassedTests: number
  numFailedTests: number
  numPendingTests: number
  numTodoTests: number
  testResults: { status: string; name: string; assertionResults: { status: string }[] }[]
}

/**
 * Runs vitest over some projects, its own output shown, and counts from its report.
 *
 * @throws SetupError when vitest ended without a report, or failed for a reason that no count shows.
 */
export async function runVitest({
  root,
  dataDir,
  projects,
  filters,
  env,
  signal,
}: VitestRun): Promise<Tally> {
  signal.throwIfAborted()
  const reportFile = path.join(dataDir, `${projects.join("-")}.json`)
  const args = [
    ...["node_modules/vitest/vitest.mjs", "run", ...filters],
    ...projects.flatMap((project) => ["--project", project]),
    ...["--reporter", "default", "--reporter", "json", `--outputFile.json=${reportFile}`],
    ...(projects.length > 1 ? ["--no-file-parallelism"] : []),
    ...(filters.length > 0 ? ["--passWithNoTests"] : []),
  ]
  const code = await runToEnd(root, args, env, signal)
  signal.throwIfAborted()
  if (!existsSync(reportFile)) throw new SetupError(`vitest ended with code ${code} and without a report.`)
  const tally = count(JSON.parse(readFileSync(reportFile, "utf8")))
  if (code !== 0 && tally.failed === 0) {
    throw new SetupError(`vitest ended with code ${code} although no test failed: see the errors above.`)
  }
  return tally
}

/** What a report says. A file that failed outside its tests (an import, a hook) counts as one failure. */
export function count(report: Report): Tally {
  const filesOnly = report.testResults.filter(
    ({ status, assertionResults }) =>
      status === "failed" && !assertionResults.some((assertion) => assertion.status === "failed"),
  )
  return {
    passed: report.numPassedTests,
    failed: report.numFailedTests + filesOnly.length,
    skipped: report.numPendingTests + report.numTodoTests,
  }
}

function runToEnd(
  root: string,
  args: readonly string[],
  env: Record<string, string>,
  signal: AbortSignal,
): Promise<number | null> {
  return new Promise((resolve, reject) => {
    const child = spawn(process.execPath, args, {
      cwd: root,
      env: { ...process.env, ...env },
      stdio: ["ignore", "inherit", "inherit"],
      detached: true,
    })
    const stop = () => {
      if (child.pid) process.kill(-child.pid, "SIGTERM")
    }
    signal.addEventListener("abort", stop, { once: true })
    child.once("error", reject)
    child.once("exit", (code) => {
      signal.removeEventListener("abort", stop)
      resolve(code)
    })
  })
}
