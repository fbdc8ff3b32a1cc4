/**
 * The whole product on this machine, as a function: private PostgreSQL, migrations, demo world, build, and the
 * processes (web, worker, Stripe fake, mail catcher, shop page), each on a loopback port.
 *
 *     const stack = await startStack({ dataDir: ".data/mine", port: 0, withNext: false })
 *     await fetch(`${stack.addresses.appUrl}/api/v1/health`)
 *     await stack.stop()
 *
 * `npm start`, `npm test` and the global set-up of vitest (tests/support) all start it here and nowhere else.
 * `withNext: false` leaves out the build and serves the API alone, ready in a few seconds.
 */
import { existsSync, mkdirSync, readFileSync } from "node:fs"
import path from "node:path"
import { migrate } from "../migrate"
import { ensureBuild } from "./build"
import { type Child, type ChildSpec, startChild } from "./children"
import { ensureDatabase } from "./database"
import { environment } from "./environment"
import { keepLocalEnv } from "./local-env"
import { lockDataDir } from "./lock"
import { choosePorts, freePort, isFree } from "./ports"
import { type Cluster, ensureCluster, startCluster, stopCluster } from "./postgres"
import { report as printReport, type Report, SetupError } from "./progress"
import { runOnce } from "./run-once"
import {
  type DatabaseUrls,
  databaseUrls,
  keepSecrets,
  loopback,
  type Ports,
  processSettings,
  productSettings,
  type Secrets,
  type Settings,
} from "./settings"

export interface StackOptions {
  dataDir: string
  /** 0 takes a free port. */
  port: number
  /** Build and serve the pages too; false serves the API alone. Default true. */
  withNext?: boolean
  report?: Report
  /** Aborting it makes a start that is under way stop what it has begun and fail. */
  signal?: AbortSignal
  /** Start a process again when it dies. Default false: a test wants to know. */
  restart?: boolean
  /** Called when a process is gone for good. */
  onGone?: (problem: string) => void
}

/** Everything that another process needs to use a stack; plain data. */
export interface Addresses {
  appUrl: string
  mailUrl: string
  stripeFakeUrl: string
  shopUrl: string
  databaseUrls: DatabaseUrls
  cluster: Cluster
  dataDir: string
  /** The settings of the web process, for tests that call verbs or start a second process. */
  settings: Settings
  demo: Demo
}

/** What `scripts/seed.ts` made, kept because a key cannot be read back. */
export interface Demo {
  password: string
  people: { email: string; does: string }[]
  sandboxKey: string
  browserKey: string
  widgetId: string
  /** Origin of the shop page, which the browser key and the widget allow. */
  shopOrigin: string
}

export interface Stack {
  addresses: Addresses
  /** The processes by name: web, worker, stripe, mail, shop. */
  children: ReadonlyMap<string, Child>
  /** Ends every process and the database; safe to call twice. */
  stop: () => Promise<void>
}

const root = path.resolve(import.meta.dirname, "../..")

/** @throws SetupError when a step fails, after everything begun has been stopped. */
export async function startStack(options: StackOptions): Promise<Stack> {
  const undo: (() => unknown)[] = []
  let stopped: Promise<void> | undefined
  const stop = () => {
    stopped ??= unwind(undo)
    return stopped
  }
  try {
    return { ...(await bringUp(options, undo)), stop }
  } catch (error) {
    await stop()
    throw error
  }
}

async function bringUp(options: StackOptions, undo: (() => unknown)[]): Promise<Omit<Stack, "stop">> {
  const report = options.report ?? printReport
  const failed = new AbortController()
  const signal = AbortSignal.any([failed.signal, ...(options.signal ? [options.signal] : [])])
  const withNext = options.withNext ?? true
  const dataDir = path.resolve(root, options.dataDir)

  if (options.port !== 0 && !(await isFree(options.port))) {
    throw new SetupError(`Port ${options.port} is busy. Set PORT to another one, as in: PORT=3100 npm start`)
  }
  mkdirSync(path.join(dataDir, "logs"), { recursive: true })
  undo.push(lockDataDir(dataDir))
  const secrets = keepSecrets(dataDir)
  const ports: Ports = { ...(await choosePorts(dataDir)), app: options.port || (await freePort()) }

  const building = withNext ? ensureBuild(root, report, signal) : Promise.resolve()
  // A build that outlives a failure elsewhere is ended, and waited for, before anything else is undone.
  building.catch(() => {})
  undo.push(async () => {
    failed.abort()
    await building.catch(() => {})
  })
  const setting: Setting = { dataDir, secrets, ports, withNext, report, signal, undo }
  const data = await prepareData(setting)
  await building

  const children = await startChildren(options, { ...setting, widgetId: data.demo.widgetId })
  const addresses = {
    appUrl: loopback(ports.app),
    mailUrl: loopback(ports.mail),
    stripeFakeUrl: loopback(ports.stripe),
    shopUrl: loopback(ports.shop),
    databaseUrls: databaseUrls(secrets, ports.postgres),
    dataDir,
    settings: productSettings(secrets, ports),
    ...data,
  }
  return { addresses, children }
}

interface Setting {
  dataDir: string
  secrets: Secrets
  ports: Ports
  withNext: boolean
  report: Report
  signal: AbortSignal
  undo: (() => unknown)[]
}

async function prepareData(setting: Setting): Promise<{ cluster: Cluster; demo: Demo }> {
  const { dataDir, secrets, ports, report, signal, undo } = setting
  const cluster = await ensureCluster(dataDir, ports.postgres, secrets.superuserPassword)
  undo.push(() => stopCluster(cluster))
  await startCluster(cluster)
  report(`PostgreSQL: listening on 127.0.0.1:${ports.postgres}`)
  signal.throwIfAborted()

  await ensureDatabase(root, secrets, ports.postgres)
  const ownerUrl = databaseUrls(secrets, ports.postgres).owner
  const kept = { ...productSettings(secrets, ports), DATABASE_OWNER_URL: ownerUrl }
  keepLocalEnv(dataDir, kept)
  const applied = await migrate(ownerUrl)
  report(`migrations: ${applied.length > 0 ? `applied ${applied.join(", ")}` : "nothing to apply"}`)
  signal.throwIfAborted()

  const demo = await prepareDemo(setting, kept)
  return { cluster, demo }
}

/** The demo world, loaded when it is not there, or when its shop page has to move to another port. */
async function prepareDemo(setting: Setting, env: Record<string, string>): Promise<Demo> {
  const { dataDir, secrets, ports, report, signal } = setting
  const file = path.join(dataDir, "demo.json")
  const read = (): Demo => JSON.parse(readFileSync(file, "utf8"))
  const shopUrl = loopback(ports.shop)
  if (existsSync(file) && read().shopOrigin === shopUrl) {
    report("demo world: kept from the last run")
    return read()
  }
  const given = {
    ...env,
    DATABASE_SUPERUSER_URL: databaseUrls(secrets, ports.postgres).superuser,
    DEMO_FILE: file,
    DEMO_PASSWORD: secrets.demoPassword,
    SHOP_URL: shopUrl,
  }
  const args = ["--import", "tsx", "scripts/seed.ts"]
  const said = await runOnce({ root, args, env: environment(given), signal })
  report(`demo world: ${said.trim()}`)
  return read()
}

async function startChildren(
  options: StackOptions,
  setting: Setting & { widgetId: string },
): Promise<Map<string, Child>> {
  const { dataDir, secrets, ports, report, signal, undo } = setting
  const settings = processSettings(secrets, ports, setting)
  const health = `${loopback(ports.app)}/api/v1/health`
  const specs: ChildSpec[] = [
    { name: "mail", script: "fakes/mail/server.ts", env: settings.mail },
    { name: "stripe", script: "fakes/stripe/server.ts", env: settings.stripe },
    { name: "shop", script: "fakes/shop/server.ts", env: settings.shop },
    { name: "worker", script: "scripts/worker.ts", env: settings.worker },
    { name: "web", script: "server.ts", env: settings.web, health },
  ]
  const children = new Map<string, Child>()
  // Started together and stopped together; the database, begun before them, stops after them.
  undo.push(() => Promise.all([...children.values()].map((child) => child.stop())))
  const outcomes = await Promise.allSettled(
    specs
      .filter((spec) => existsSync(path.join(root, spec.script)))
      .map(async (spec) => {
        const child = await startChild(spec, {
          root,
          logDir: path.join(dataDir, "logs"),
          report,
          restart: options.restart ?? false,
          onGone: options.onGone ?? report,
          signal,
        })
        children.set(spec.name, child)
        report(`${spec.name}: ready`)
      }),
  )
  for (const outcome of outcomes) if (outcome.status === "rejected") throw outcome.reason
  return children
}

/** Runs the steps that undo, last first; one that fails does not keep the others from running. */
async function unwind(undo: (() => unknown)[]): Promise<void> {
  const problems: unknown[] = []
  for (const step of undo.reverse()) {
    try {
      await step()
    } catch (problem) {
      problems.push(problem)
    }
  }
  if (problems.length > 0) throw new AggregateError(problems, "Not everything could be stopped.")
}
