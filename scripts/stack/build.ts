/** Builds the site and the widgets, only when a source of theirs has changed since the last build. */
import { createHash } from "node:crypto"
import { existsSync, mkdirSync, readdirSync, readFileSync, rmSync, writeFileSync } from "node:fs"
import os from "node:os"
import path from "node:path"
import { environment } from "./environment"
import type { Report } from "./progress"
import { runOnce } from "./run-once"

/** Folders of the project that no build reads; any other is taken to matter. */
const unread = new Set([
  ...["node_modules", ".git", ".next", ".data", ".ci", "coverage", "dist", "tmp", "docs"],
  ...["bench", "fakes", "migrations", "scripts", "tests", "public/w", "next-env.d.ts"],
])

/**
 * Builds what is stale. Two commands that start at once do not build at once: the second waits and finds the work
 * done.
 *
 * @throws SetupError with the end of the output when a build fails.
 */
export async function ensureBuild(root: string, report: Report, signal: AbortSignal): Promise<void> {
  const stamp = path.join(root, ".next/tarnwright-sources")
  const isFresh = (hash: string) =>
    existsSync(path.join(root, ".next/BUILD_ID")) &&
    existsSync(stamp) &&
    readFileSync(stamp, "utf8") === hash &&
    existsSync(path.join(root, "public/w"))

  if (isFresh(hashSources(root))) return report("site and widgets: the build is up to date")
  const release = await takeLock(root, report, signal)
  try {
    const hash = hashSources(root)
    if (isFresh(hash)) return report("site and widgets: built meanwhile by another command")
    rmSync(stamp, { force: true })
    report("building the widgets")
    await run(root, ["--import", "tsx", "widgets/build.ts"], signal)
    report("building the site (half a minute or so)")
    await run(root, ["node_modules/next/dist/bin/next", "build"], signal)
    writeFileSync(stamp, hash)
    report("site and widgets: built")
  } finally {
    release()
  }
}

function hashSources(root: string): string {
  const hash = createHash("sha256").update(process.version)
  for (const file of sources(root, "")) hash.update(`\0${file}\0`).update(readFileSync(path.join(root, file)))
  return hash.digest("hex")
}

function sources(root: string, folder: string): string[] {
  const entries = readdirSync(path.join(root, folder), { withFileTypes: true })
  return entries
    .sort((a, b) => (a.name < b.name ? -1 : 1))
    .flatMap((entry) => {
      const name = path.posix.join(folder, entry.name)
      if (unread.has(name) || name.endsWith(".tsbuildinfo") || /^[^/]*\.md$/.test(name)) return []
      if (entry.isDirectory()) return sources(root, name)
      return entry.isFile() ? [name] : []
    })
}

/** One build at a time in a work tree; a lock whose owner is gone counts for nothing. */
async function takeLock(root: string, report: Report, signal: AbortSignal): Promise<() => void> {
  const tree = createHash("sha256").update(root).digest("hex").slice(0, 16)
  const lock = path.join(os.tmpdir(), `tarnwright-build-${tree}`)
  for (let waited = 0; ; waited += 1) {
    try {
      mkdirSync(lock)
      writeFileSync(path.join(lock, "pid"), String(process.pid))
      return () => rmSync(lock, { recursive: true, force: true })
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code !== "EEXIST") throw error
    }
    if (!ownerLives(lock) && waited > 0) rmSync(lock, { recursive: true, force: true })
    else if (waited === 0) report("another command is building: waiting for it")
    await new Promise((resolve) => setTimeout(resolve, 500))
    signal.throwIfAborted()
  }
}

function ownerLives(lock: string): boolean {
  try {
    process.kill(Number(readFileSync(path.join(lock, "pid"), "utf8")), 0)
    return true
  } catch (error) {
    return (error as NodeJS.ErrnoException).code === "EPERM"
  }
}

async function run(root: string, args: readonly string[], signal: AbortSignal): Promise<void> {
  await runOnce({ root, args, env: environment({ NEXT_TELEMETRY_DISABLED: "1" }), signal })
}
