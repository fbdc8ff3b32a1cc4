import { execFile } from "node:child_process"
import { writeFileSync } from "node:fs"
import path from "node:path"
import { promisify } from "node:util"

const run = promisify(execFile)

export interface Target {
  readonly url: string
  readonly body: object
  readonly secrets: readonly string[]
}

export interface Load {
  readonly requests_per_s: number
  readonly requests: number
  readonly p50_ms: number
  readonly p99_ms: number
  readonly failed: number
}

/** Load from wrk (Debian's package) on 20 connections of loopback for some seconds, a key after the other. */
export async function load(
  target: Target,
  { seconds, dir }: { seconds: number; dir: string },
): Promise<Load> {
  const { host } = new URL(target.url)
  if (!/^127\.0\.0\.1:/.test(host)) throw new Error(`A load goes to this machine only, not to ${host}`)
  const script = path.join(dir, "load.lua")
  writeFileSync(script, lua(target))
  // The first compilation of a route may take longer than wrk's own 2 s.
  const options = ["-t1", "-c20", `-d${seconds}s`, "--timeout", "10s", "--latency", "-s", script]
  const { stdout } = await run("wrk", [...options, target.url])
  const number = (pattern: RegExp) => Number(pattern.exec(stdout)?.[1] ?? Number.NaN)
  return {
    requests_per_s: number(/^requests_per_s=([\d.]+)/m),
    requests: number(/^requests=(\d+)/m),
    p50_ms: number(/^p50_ms=([\d.]+)/m),
    p99_ms: number(/^p99_ms=([\d.]+)/m),
    failed: number(/^failed=(\d+)/m),
  }
}

function lua({ url, body, secrets }: Target): string {
  const { pathname } = new URL(url)
  return `
local secrets = { ${secrets.map((secret) => JSON.stringify(secret)).join(", ")} }
local requests = {}
local body = [==[${JSON.stringify(body)}]==]
local next_request = 0
init = function()
  wrk.method = "POST"
  wrk.headers["Content-Type"] = "application/json"
  for i, secret in ipairs(secrets) do
    wrk.headers["Authorization"] = "Bearer " .. secret
    requests[i] = wrk.format(nil, ${JSON.stringify(pathname)}, nil, body)
  end
end
request = function()
  next_request = next_request % #requests + 1
  return requests[next_request]
end
done = function(summary, latency)
  io.write(string.format("requests_per_s=%f\\n", summary.requests / summary.duration * 1e6))
  io.write(string.format("requests=%d\\n", summary.requests))
  io.write(string.format("p50_ms=%f\\n", latency:percentile(50) / 1000))
  io.write(string.format("p99_ms=%f\\n", latency:percentile(99) / 1000))
  io.write(string.format("failed=%d\\n", summary.errors.status + summary.errors.connect + summary.errors.read + summary.errors.timeout))
end
`
}
