import path from "node:path"
import { environment } from "../stack/environment"
import { report, SetupError } from "../stack/progress"
import { runOnce } from "../stack/run-once"

const root = path.resolve(import.meta.dirname, "../..")

interface Step {
  name: string
  args: readonly string[]
  /** What to do when it fails. */
  remedy: string
}

/** Written by the other steps' readers before they look: the types of the routes that exist now. */
const routeTypes: Step = {
  name: "types of the routes",
  args: ["node_modules/next/dist/bin/next", "typegen"],
  remedy: "a page or its configuration does not load",
}

const steps: readonly Step[] = [
  {
    name: "types",
    args: ["node_modules/typescript/bin/tsc", "--noEmit"],
    remedy: "mend the types above",
  },
  {
    name: "lint and format",
    args: ["node_modules/@biomejs/biome/bin/biome", "check", "--error-on-warnings"],
    remedy: "npx biome check --write mends what can be mended",
  },
  {
    name: "architecture",
    args: ["node_modules/vitest/vitest.mjs", "run", "--project", "unit", "tests/architecture.test.ts"],
    remedy: "DEVELOPERS.md says which room may import which",
  },
  {
    name: "OpenAPI document",
    args: ["--import", "tsx", "openapi/build.ts", "--check"],
    remedy: "npm run openapi writes it anew; commit the difference if you meant it",
  },
]

/** Runs every check, a line each, and ends with 1 when one fails; its output follows the line. */
export async function check(): Promise<void> {
  const ending = new AbortController()
  for (const signal of ["SIGINT", "SIGTERM"] as const) process.once(signal, () => ending.abort(signal))
  const passed = (await runStep(routeTypes, ending.signal))
    ? await Promise.all(steps.map((step) => runStep(step, ending.signal)))
    : [false]
  const failures = passed.filter((each) => !each).length
  report(failures === 0 ? "all checks passed" : `${failures} of ${steps.length} checks failed`)
  process.exit(failures === 0 ? 0 : 1)
}

async function runStep({ name, args, remedy }: Step, signal: AbortSignal): Promise<boolean> {
  try {
    await runOnce({
      root,
      args,
      env: environment({ NEXT_TELEMETRY_DISABLED: "1", NODE_ENV: "test" }),
      signal,
    })
    report(`passed  ${name}`)
    return true
  } catch (error) {
    const output = error instanceof SetupError ? error.message : String(error)
    report(`FAILED  ${name}: ${remedy}\n${output}`)
    return false
  }
}
