import { describe, expect, it } from "vitest"
import { hashPassword, isOutdated, isPasswordOf } from "@/lib/accounts/password"

describe("a stored password", () => {
  it("is argon2id at the cost that OWASP asks for at least, and never the same twice", async () => {
    const [one, other] = await Promise.all([hashPassword("tarn moss valve"), hashPassword("tarn moss valve")])
    expect(one).toMatch(/^\$argon2id\$v=19\$m=19456,t=2,p=1\$/)
    expect(one).not.toBe(other)
    expect(isOutdated(one!)).toBe(false)
  })

  it("belongs to its own password alone", async () => {
    const stored = await hashPassword("tarn moss valve lantern")
    expect(await isPasswordOf(stored, "tarn moss valve lantern")).toBe(true)
    expect(await isPasswordOf(stored, "tarn moss valve lanterns")).toBe(false)
  })

  it("is as much work to refuse where there is none", async () => {
    const stored = await hashPassword("tarn moss valve lantern")
    const known = await timed(() => isPasswordOf(stored, "wrong"))
    const unknown = await timed(() => isPasswordOf(undefined, "wrong"))
    expect(await isPasswordOf(undefined, "wrong")).toBe(false)
    expect(unknown / known).toBeGreaterThan(0.4)
    expect(unknown / known).toBeLessThan(2.5)
  })

  it("asks for a new hash when the cost has grown", () => {
    expect(isOutdated("$argon2id$v=19$m=4096,t=3,p=1$c2FsdHNhbHQ$aGFzaA")).toBe(true)
  })
})

/** The fastest of several runs: what the work takes when nothing disturbs it. */
async function timed(work: () => Promise<unknown>): Promise<number> {
  let best = Number.POSITIVE_INFINITY
  for (let run = 0; run < 7; run++) {
    const begin = performance.now()
    await work()
    best = Math.min(best, performance.now() - begin)
  }
  return best
}
