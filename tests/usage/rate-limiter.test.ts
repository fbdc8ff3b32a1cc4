import { type ChildProcess, spawn } from "node:child_process"
import { mkdtempSync } from "node:fs"
import { createServer } from "node:net"
import { tmpdir } from "node:os"
import { join } from "node:path"
import { Redis } from "ioredis"
import { afterAll, beforeAll, describe, expect, it } from "vitest"
import { createMemoryRateLimiter, createRedisRateLimiter } from "@/lib/usage/rate-limiter"

let server: ChildProcess
let redis: Redis
let other: Redis

// A real Redis from Debian's packages, of this suite's own.
beforeAll(async () => {
  const port = await freePort()
  const dir = mkdtempSync(join(tmpdir(), "rate-limiter-"))
  server = spawn("redis-server", ["--port", `${port}`, "--bind", "127.0.0.1", "--save", "", "--dir", dir], {
    stdio: "ignore",
  })
  redis = new Redis(port, "127.0.0.1", { retryStrategy: () => 100 })
  other = new Redis(port, "127.0.0.1", { retryStrategy: () => 100 })
  for (const client of [redis, other]) client.on("error", () => {})
  await Promise.all([redis.ping(), other.ping()])
})

afterAll(() => {
  redis.disconnect()
  other.disconnect()
  server.kill()
})

// What every adapter promises.
describe.each([
  ["in memory", () => createMemoryRateLimiter()],
  ["in Redis", () => createRedisRateLimiter(redis)],
])("a rate limiter %s", (name, create) => {
  const limit = { points: 5, window_s: 2 }

  it("lets through as many calls as the window holds, and not one more", async () => {
    const limiter = create()
    const states = []
    for (let call = 0; call < 7; call++) states.push(await limiter.take(`${name} count`, limit))
    expect(states.map(({ allowed }) => allowed)).toEqual([true, true, true, true, true, false, false])
    expect(states.map(({ remaining }) => remaining)).toEqual([4, 3, 2, 1, 0, 0, 0])
    for (const { reset_s } of states) expect(reset_s).toSatisfy((s: number) => s >= 1 && s <= 2)
  })

  it("is exact when calls come at once", async () => {
    const limiter = create()
    const states = await Promise.all(Array.from({ length: 40 }, () => limiter.take(`${name} burst`, limit)))
    expect(states.filter(({ allowed }) => allowed)).toHaveLength(5)
  })

  it("keeps subjects and limits apart", async () => {
    const limiter = create()
    const tight = { points: 1, window_s: 2 }
    expect((await limiter.take(`${name} one`, tight)).allowed).toBe(true)
    expect((await limiter.take(`${name} one`, tight)).allowed).toBe(false)
    expect((await limiter.take(`${name} two`, tight)).allowed).toBe(true)
    expect((await limiter.take(`${name} one`, limit)).allowed).toBe(true)
  })

  it("is whole again after the window", async () => {
    const limiter = create()
    const short = { points: 1, window_s: 1 }
    await limiter.take(`${name} window`, short)
    expect((await limiter.take(`${name} window`, short)).allowed).toBe(false)
    await new Promise((resolve) => setTimeout(resolve, 1_100))
    expect((await limiter.take(`${name} window`, short)).allowed).toBe(true)
  })
})

describe("a rate limiter in Redis", () => {
  it("counts for two processes together", async () => {
    const [one, two] = [createRedisRateLimiter(redis), createRedisRateLimiter(other)]
    const limit = { points: 10, window_s: 5 }
    const states = await Promise.all(
      Array.from({ length: 30 }, (_, call) => (call % 2 ? one : two).take("shared", limit)),
    )
    expect(states.filter(({ allowed }) => allowed)).toHaveLength(10)
  })

  it("goes on counting in each process while Redis is gone", async () => {
    const lost = new Redis(await freePort(), "127.0.0.1", {
      enableOfflineQueue: false,
      maxRetriesPerRequest: 1,
      retryStrategy: () => null,
    })
    lost.on("error", () => {})
    const limiter = createRedisRateLimiter(lost)
    const states = []
    for (let call = 0; call < 3; call++) states.push(await limiter.take("lost", { points: 2, window_s: 5 }))
    expect(states.map(({ allowed }) => allowed)).toEqual([true, true, false])
    lost.disconnect()
  })
})

function freePort(): Promise<number> {
  return new Promise((resolve) => {
    const probe = createServer().listen(0, "127.0.0.1", () => {
      const address = probe.address()
      probe.close(() => resolve(typeof address === "object" && address ? address.port : 0))
    })
  })
}
