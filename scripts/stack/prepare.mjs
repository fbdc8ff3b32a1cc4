// What must be there before any package of ours can be imported: Node.js, programs of the system, node_modules.
// Plain JavaScript without dependencies, for that reason.
import { spawn } from "node:child_process"
import { existsSync, readdirSync, readFileSync } from "node:fs"
import path from "node:path"
import { fileURLToPath } from "node:url"

const root = path.resolve(path.dirname(fileURLToPath(import.meta.url)), "../..")

/** Programs that a command may need, with Debian's package that brings each. */
const programs = {
  postgresql: { package: "postgresql", isThere: hasPostgres },
  chromium: { package: "chromium", isThere: () => existsSync("/usr/bin/chromium") },
  redis: { package: "redis-server", isThere: () => existsSync("/usr/bin/redis-server") },
  poppler: { package: "poppler-utils", isThere: () => existsSync("/usr/bin/pdftotext") },
}

/**
 * Checks Node.js, installs the named programs and node_modules where they are missing, and teaches this process
 * TypeScript. Ends the process with a message when that cannot be done.
 */
export async function prepare(names) {
  try {
    checkNode()
    const missing = names.map((name) => programs[name]).filter((program) => !program.isThere())
    const outcomes = await Promise.allSettled([installPrograms(missing), installModules()])
    for (const { reason } of outcomes) if (reason) throw reason
  } catch (error) {
    say(error.message)
    process.exit(1)
  }
  process.chdir(root)
  const { register } = await import("tsx/esm/api")
  register()
}

function checkNode() {
  const { engines } = JSON.parse(readFileSync(path.join(root, "package.json"), "utf8"))
  const needed = engines.node.replace(">=", "")
  if (compareVersions(process.versions.node, needed) < 0) {
    throw new Error(`Tarnwright needs Node.js ${needed} or newer; this is ${process.versions.node}.`)
  }
}

function compareVersions(a, b) {
  const [left, right] = [a, b].map((version) => version.split(".").map(Number))
  for (let part = 0; part < 3; part += 1) {
    const difference = (left[part] || 0) - (right[part] || 0)
    if (difference !== 0) return difference
  }
  return 0
}

function hasPostgres() {
  const base = "/usr/lib/postgresql"
  const versions = existsSync(base) ? readdirSync(base) : []
  return versions.some((version) => Number(version) >= 15 && existsSync(`${base}/${version}/bin/postgres`))
}

async function installPrograms(missing) {
  if (missing.length === 0) return
  const packages = missing.map((program) => program.package)
  const install = ["-o", "DPkg::Lock::Timeout=300", "install", "-y", "--no-install-recommends", ...packages]
  const byHand = `sudo apt-get update && sudo apt-get install --no-install-recommends ${packages.join(" ")}`
  if (!existsSync("/usr/bin/apt-get")) {
    throw new Error(
      `${packages.join(" and ")} missing, and this system has no apt-get: install them and run again.`,
    )
  }
  const isRoot = process.getuid() === 0
  if (!isRoot && !(await succeeds("sudo", ["-n", "true"]))) {
    throw new Error(
      `${packages.join(" and ")} missing, and only root may install. Run this once:\n  ${byHand}`,
    )
  }
  const apt = (options) => {
    const command = ["env", "DEBIAN_FRONTEND=noninteractive", "apt-get", ...options]
    return isRoot ? run(command) : run(["sudo", "-n", ...command])
  }
  say(`installing ${packages.join(", ")} from the system's packages`)
  const known = await apt(install)
  if (!known.ok) {
    say("refreshing the list of packages")
    await apt(["-o", "DPkg::Lock::Timeout=300", "update"])
    const again = await apt(install)
    if (!again.ok) throw new Error(`Installing failed:\n${again.output}\nTo do it by hand:\n  ${byHand}`)
  }
  if (!missing.every((program) => program.isThere())) {
    throw new Error(
      `${packages.join(" and ")} installed, but not in a usable version (PostgreSQL 15 or newer).`,
    )
  }
}

/** npm leaves a copy of the lock file in node_modules as its last act, which says what is installed there. */
async function installModules() {
  const wanted = readPackages(path.join(root, "package-lock.json"))
  if (!wanted) throw new Error("package-lock.json is missing: the clone is not complete.")
  const installed = readPackages(path.join(root, "node_modules/.package-lock.json")) || {}
  const differs = Object.entries(wanted).some(([place, { version, optional }]) => {
    if (!place.startsWith("node_modules/") || version === undefined) return false
    return installed[place] ? installed[place].version !== version : !optional
  })
  if (!differs) return
  say("installing the Node.js packages of package-lock.json (npm ci)")
  const { ok, output } = await run([
    "npm",
    "ci",
    "--ignore-scripts",
    "--include=dev",
    "--no-audit",
    "--no-fund",
  ])
  if (!ok) throw new Error(`npm ci failed:\n${output}`)
}

function readPackages(file) {
  return existsSync(file) ? JSON.parse(readFileSync(file, "utf8")).packages : undefined
}

function succeeds(program, options) {
  return run([program, ...options]).then(({ ok }) => ok)
}

/** Runs a program to its end; a signal that ends us is passed on to it first, so that it can tidy up. */
function run([program, ...options]) {
  return new Promise((resolve) => {
    const child = spawn(program, options, { cwd: root, stdio: ["ignore", "pipe", "pipe"] })
    let output = ""
    const keep = (chunk) => {
      output = (output + chunk).slice(-4000)
    }
    const passOn = (signal) => {
      child.kill(signal)
      child.once("close", () => process.exit(130))
    }
    const signals = ["SIGINT", "SIGTERM"]
    for (const signal of signals) process.on(signal, passOn)
    const done = (result) => {
      for (const signal of signals) process.off(signal, passOn)
      resolve(result)
    }
    child.stdout.on("data", keep)
    child.stderr.on("data", keep)
    child.once("error", (error) => done({ ok: false, output: error.message }))
    child.once("close", (code) => done({ ok: code === 0, output }))
  })
}

function say(line) {
  const seconds = ((Date.now() - performance.timeOrigin) / 1000).toFixed(1)
  process.stdout.write(`${seconds.padStart(6)} s  ${line}\n`)
}
