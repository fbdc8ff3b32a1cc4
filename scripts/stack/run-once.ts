import { type ChildProcess, spawn } from "node:child_process"
import { SetupError } from "./progress"

export interface Command {
  root: string
  /** Arguments of `node`. */
  args: readonly string[]
  env: NodeJS.ProcessEnv
  signal: AbortSignal
}

/**
 * Runs a Node process to its end and returns what it printed; an abort ends it and everything it started.
 *
 * @throws SetupError with the end of the output when it fails.
 */
export async function runOnce({ root, args, env, signal }: Command): Promise<string> {
  signal.throwIfAborted()
  const child = spawn(process.execPath, args, {
    cwd: root,
    env,
    stdio: ["ignore", "pipe", "pipe"],
    detached: true,
  })
  const stop = () => {
    if (child.pid) process.kill(-child.pid, "SIGTERM")
  }
  signal.addEventListener("abort", stop, { once: true })
  try {
    const { code, output } = await finished(child)
    signal.throwIfAborted()
    if (code !== 0) throw new SetupError(`${args.at(-1)} failed:\n${output.slice(-6_000)}`)
    return output
  } finally {
    signal.removeEventListener("abort", stop)
  }
}

function finished(child: ChildProcess): Promise<{ code: number | null; output: string }> {
  return new Promise((resolve, reject) => {
    let output = ""
    const keep = (chunk: Buffer) => {
      output += chunk
    }
    child.stdout?.on("data", keep)
    child.stderr?.on("data", keep)
    child.once("error", reject)
    child.once("close", (code) => resolve({ code, output }))
  })
}
