import { type ChildProcess, execFileSync, spawn } from "node:child_process"
import path from "node:path"

const root = path.resolve(import.meta.dirname, "../..")
const next = path.join(root, "node_modules/next/dist/bin/next")
const bareApp = path.join(import.meta.dirname, "bare-app")

export interface Started {
  readonly url: string
  stop(): Promise<void>
}

/** Starts a process of Node.js in the project and waits for the loopback address that it prints. */
export function start(args: readonly string[], settings: Record<string, string>): Promise<Started> {
  const child = spawn(process.execPath, args, {
    cwd: root,
    env: { ...process.env, ...settings },
    stdio: ["ignore", "pipe", "inherit"],
  })
  return new Promise((resolve, reject) => {
    let printed = ""
    child.stdout.on("data", (chunk) => {
      printed += chunk
      const port = /http:\/\/(?:127\.0\.0\.1|localhost):(\d+)/.exec(printed)?.[1]
      if (port) resolve({ url: `http://127.0.0.1:${port}`, stop: () => stop(child) })
    })
    child.once("exit", (code) => reject(new Error(`${args.join(" ")} ended with ${code}\n${printed}`)))
  })
}

/** Builds and starts a Next.js application of one route that does nothing. */
export function startBareApp(settings: Record<string, string>): Promise<Started> {
  execFileSync(process.execPath, [next, "build", bareApp], {
    stdio: "ignore",
    env: { ...process.env, NEXT_TELEMETRY_DISABLED: "1" },
  })
  return start([next, "start", bareApp, "-H", "127.0.0.1", "-p", "0"], settings)
}

async function stop(child: ChildProcess): Promise<void> {
  if (child.exitCode !== null) return
  const ended = new Promise((resolve) => child.once("exit", resolve))
  child.kill("SIGTERM")
  await ended
}
