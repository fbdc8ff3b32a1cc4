/** Lets a script find the database and the secrets of the local run, which the start command writes. */
import { readFileSync, writeFileSync } from "node:fs"
import path from "node:path"

const root = path.resolve(import.meta.dirname, "../..")

/** The folder that holds everything a local run keeps: `TARN_DATA_DIR`, or `.data` in the project. */
export function localDataDir(): string {
  return path.resolve(root, process.env.TARN_DATA_DIR || ".data")
}

/**
 * Takes the settings of the local run into `process.env`, unless a database is named there already (then the
 * settings come from outside, as in production). Call it before anything reads `lib/env.ts`.
 *
 * @throws Error when there is no local run to take them from.
 */
export function loadLocalEnv(): void {
  if (process.env.DATABASE_URL || process.env.DATABASE_OWNER_URL) return
  const file = localEnvFile(localDataDir())
  let kept: Record<string, string>
  try {
    kept = JSON.parse(readFileSync(file, "utf8"))
  } catch (cause) {
    const problem = `There is no local run in ${path.dirname(file)}: run npm start, or set TARN_DATA_DIR.`
    throw new Error(problem, { cause })
  }
  Object.assign(process.env, kept)
}

/** Keeps settings for `loadLocalEnv`, readable by their owner only. */
export function keepLocalEnv(dataDir: string, settings: Record<string, string>): void {
  writeFileSync(localEnvFile(dataDir), `${JSON.stringify(settings, null, 2)}\n`, { mode: 0o600 })
}

function localEnvFile(dataDir: string): string {
  return path.join(dataDir, "env.json")
}
