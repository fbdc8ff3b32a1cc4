/**
 * A private PostgreSQL cluster on a loopback port, run by a user that is not root.
 *
 * `startCluster` and `stopCluster` need only the plain data of a `Cluster`, so a test may stop and start the
 * database under a running application from its own process.
 */
import { execFile } from "node:child_process"
import { randomBytes } from "node:crypto"
import {
  chmodSync,
  chownSync,
  existsSync,
  lstatSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  realpathSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from "node:fs"
import os from "node:os"
import path from "node:path"
import { promisify } from "node:util"
import { environment } from "./environment"
import { SetupError } from "./progress"

const run = promisify(execFile)

export interface Cluster {
  binDir: string
  /** The cluster's own folder, symbolic links resolved. */
  dir: string
  port: number
}

/** `fast` ends sessions and writes a checkpoint; `immediate` is what a crash looks like. */
export type StopMode = "fast" | "immediate"

/** Name of the superuser of the cluster: used to make roles and the database, by nothing else. */
export const SUPERUSER = "postgres"

/**
 * The cluster in `DATA_DIR/postgres`, made when it is not there.
 *
 * Started as root, PostgreSQL runs as the system's `postgres` user. When that user cannot reach the data folder
 * (a clone under a home or temporary folder that only root may enter) the cluster lives in that user's own home
 * and `DATA_DIR/postgres` is a symbolic link to it.
 *
 * @throws SetupError when PostgreSQL is not installed or initdb fails.
 */
export async function ensureCluster(dataDir: string, port: number, password: string): Promise<Cluster> {
  const binDir = findBinDir()
  const place = path.join(dataDir, "postgres")
  if (existsSync(path.join(place, "PG_VERSION"))) return { binDir, dir: realpathSync(place), port }

  if (lstatSync(place, { throwIfNoEntry: false })) rmSync(place, { recursive: true })
  const dir = await makeFolder(place)
  await initialise({ binDir, dir, port }, password)
  return { binDir, dir, port }
}

/**
 * Starts the cluster and waits until it accepts connections. A server left over from a run that was killed is
 * stopped first, and the lock file of one that died is removed.
 */
export async function startCluster(cluster: Cluster): Promise<void> {
  await clearLeftover(cluster)
  const log = path.join(cluster.dir, "server.log")
  try {
    await pgCtl(cluster, "start", "-w", "-t", "60", "-l", log, "-o", `-p ${cluster.port}`)
  } catch (cause) {
    const lines = existsSync(log) ? readFileSync(log, "utf8").trimEnd().split("\n").slice(-5).join("\n") : ""
    throw new SetupError(`PostgreSQL did not start. The end of its log:\n${lines}`, { cause })
  }
}

/** Stops the cluster; one that does not run is no error. */
export async function stopCluster(cluster: Cluster, mode: StopMode = "fast"): Promise<void> {
  if (isRunning(cluster)) await pgCtl(cluster, "stop", "-w", "-t", "60", "-m", mode)
}

/** Whether the process of the lock file lives and is this cluster's server. */
export function isRunning(cluster: Cluster): boolean {
  const pid = lockedBy(cluster)
  if (pid === undefined) return false
  try {
    return readFileSync(`/proc/${pid}/cmdline`, "utf8").split("\0").includes(cluster.dir)
  } catch {
    return false
  }
}

/** Removes the cluster's files, also where `place` is a link to them. */
export function removeCluster(dataDir: string): void {
  const place = path.join(dataDir, "postgres")
  if (!lstatSync(place, { throwIfNoEntry: false })) return
  if (existsSync(place)) rmSync(realpathSync(place), { recursive: true, force: true })
  rmSync(place, { recursive: true, force: true })
}

function findBinDir(): string {
  const base = "/usr/lib/postgresql"
  const versions = existsSync(base) ? readdirSync(base) : []
  const newest = versions
    .filter((version) => existsSync(path.join(base, version, "bin", "postgres")))
    .sort((a, b) => Number(b) - Number(a))[0]
  if (!newest || Number(newest) < 15) throw new SetupError("PostgreSQL 15 or newer is not installed.")
  return path.join(base, newest, "bin")
}

async function makeFolder(place: string): Promise<string> {
  mkdirSync(place, { mode: 0o700 })
  const server = serverUser()
  if (!server) return realpathSync(place)

  chownSync(place, server.uid, server.gid)
  if (await canEnter(place)) return realpathSync(place)

  rmSync(place, { recursive: true })
  const dir = path.join(server.home, `tarnwright-${randomBytes(6).toString("hex")}`)
  mkdirSync(dir, { mode: 0o700 })
  chownSync(dir, server.uid, server.gid)
  symlinkSync(dir, place)
  return dir
}

async function initialise(cluster: Cluster, password: string): Promise<void> {
  const passwordFile = path.join(os.tmpdir(), `tarnwright-${randomBytes(12).toString("hex")}`)
  writeFileSync(passwordFile, password, { mode: 0o600 })
  const server = serverUser()
  if (server) chownSync(passwordFile, server.uid, server.gid)
  try {
    await asServer(cluster, "initdb", [
      ...["-D", cluster.dir, "-U", SUPERUSER, `--pwfile=${passwordFile}`],
      ...["--auth=scram-sha-256", "--encoding=UTF8", "--locale=C.UTF-8", "--data-checksums"],
    ])
  } catch (cause) {
    rmSync(path.join(cluster.dir, "PG_VERSION"), { force: true })
    throw new SetupError(`initdb failed: ${(cause as Error).message}`, { cause })
  } finally {
    rmSync(passwordFile)
  }
  const config = path.join(cluster.dir, "postgresql.conf")
  // No Unix socket at all: a socket below the project panics the scan of the CSS build, and nothing needs one.
  const ours = ["listen_addresses = '127.0.0.1'", "unix_socket_directories = ''", "timezone = 'UTC'"]
  writeFileSync(config, `${readFileSync(config, "utf8")}\n${ours.join("\n")}\n`)
  chmodSync(config, 0o600)
}

async function clearLeftover(cluster: Cluster): Promise<void> {
  if (isRunning(cluster)) await stopCluster(cluster)
  else rmSync(path.join(cluster.dir, "postmaster.pid"), { force: true })
}

function lockedBy(cluster: Cluster): number | undefined {
  try {
    return Number.parseInt(readFileSync(path.join(cluster.dir, "postmaster.pid"), "utf8"), 10)
  } catch {
    return undefined
  }
}

async function pgCtl(cluster: Cluster, action: string, ...options: string[]): Promise<void> {
  await asServer(cluster, "pg_ctl", [action, "-D", cluster.dir, ...options])
}

/** Runs one of PostgreSQL's programs as the user who owns the cluster, from inside its folder. */
async function asServer(cluster: Cluster, program: string, options: string[]): Promise<void> {
  const command = [...dropPrivileges(), path.join(cluster.binDir, program), ...options]
  await run(command[0]!, command.slice(1), {
    cwd: cluster.dir,
    env: environment({ LC_ALL: "C.UTF-8" }),
  })
}

async function canEnter(dir: string): Promise<boolean> {
  const command = [...dropPrivileges(), "test", "-w", dir]
  return run(command[0]!, command.slice(1)).then(
    () => true,
    () => false,
  )
}

function dropPrivileges(): string[] {
  return serverUser() ? ["setpriv", "--reuid=postgres", "--regid=postgres", "--init-groups"] : []
}

/** The user that runs PostgreSQL when we are root; undefined when we run it ourselves. */
function serverUser(): { uid: number; gid: number; home: string } | undefined {
  if (process.getuid?.() !== 0) return undefined
  const entry = readFileSync("/etc/passwd", "utf8")
    .split("\n")
    .map((line) => line.split(":"))
    .find(([name]) => name === "postgres")
  if (!entry)
    throw new SetupError("The system user postgres is missing: install Debian's postgresql package.")
  return { uid: Number(entry[2]), gid: Number(entry[3]), home: entry[5]! }
}
