import { afterEach, describe, expect, it, vi } from "vitest"
import { practiceSettings } from "../support/settings"

afterEach(() => {
  vi.unstubAllEnvs()
  vi.resetModules()
})

describe("the setting that lets webhooks go to this machine", () => {
  async function readWith(given: Record<string, string>) {
    for (const [name, value] of Object.entries({ ...practiceSettings(), ...given })) vi.stubEnv(name, value)
    const { env } = await import("@/lib/env")
    return env()
  }

  it("is off unless it is set", async () => {
    expect((await readWith({})).WEBHOOKS_ALLOW_LOOPBACK).toBeUndefined()
  })

  it("may be on where the site is served over http", async () => {
    expect((await readWith({ WEBHOOKS_ALLOW_LOOPBACK: "1" })).WEBHOOKS_ALLOW_LOOPBACK).toBe("1")
  })

  it.each(["https://tarnwright.example", "HTTPS://tarnwright.example"])(
    "stops a process at %s",
    async (PUBLIC_URL) => {
      await expect(readWith({ PUBLIC_URL, WEBHOOKS_ALLOW_LOOPBACK: "1" })).rejects.toThrow(
        "WEBHOOKS_ALLOW_LOOPBACK",
      )
    },
  )
})
