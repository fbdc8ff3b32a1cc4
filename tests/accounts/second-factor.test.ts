import { describe, expect, it } from "vitest"
import { digestOfRecoveryCode, newRecoveryCodes } from "@/lib/accounts/recovery-codes"
import { newSeed, stepOf, totpUri } from "@/lib/accounts/totp"

// RFC 6238, appendix B: the SHA-1 rows, whose last six digits are what six-digit apps show.
const rfcSeed = "GEZDGNBVGY3TQOJQGEZDGNBVGY3TQOJQ"
const rfcRows: [seconds: number, code: string][] = [
  [59, "287082"],
  [1111111109, "081804"],
  [1111111111, "050471"],
  [1234567890, "005924"],
  [2000000000, "279037"],
  [20000000000, "353130"],
]

describe("a code of an app", () => {
  it.each(rfcRows)("of the second %d is %s, as RFC 6238 prints it", (seconds, code) => {
    expect(stepOf(rfcSeed, code, new Date(seconds * 1000))).toBe(Math.floor(seconds / 30))
  })

  it("is good one step before and after its own, and no further", () => {
    const [seconds, code] = [1111111109, "081804"]
    const at = (shift_s: number) => stepOf(rfcSeed, code, new Date((seconds + shift_s) * 1000))
    const own = Math.floor(seconds / 30)
    expect([at(-30), at(0), at(30)]).toEqual([own, own, own])
    expect([at(-60), at(60)]).toEqual([undefined, undefined])
  })

  it("comes from a seed of 160 bits that the address for the app carries", () => {
    const seed = newSeed()
    expect(seed).toMatch(/^[A-Z2-7]{32}$/)
    const uri = new URL(totpUri(seed, "maren@fernhollow.test"))
    expect(uri.protocol).toBe("otpauth:")
    expect(Object.fromEntries(uri.searchParams)).toMatchObject({
      secret: seed,
      issuer: "Tarnwright",
      digits: "6",
      period: "30",
      algorithm: "SHA1",
    })
  })
})

describe("recovery codes", () => {
  const codes = newRecoveryCodes()

  it("are ten, each of 120 bits, none like another", () => {
    expect(new Set(codes).size).toBe(10)
    for (const code of codes) expect(code).toMatch(/^([a-z2-7]{4}-){5}[a-z2-7]{4}$/)
  })

  it("are the same however they are typed", () => {
    const [code] = codes as [string]
    expect(digestOfRecoveryCode(` ${code.toUpperCase().replaceAll("-", " ")} `)).toEqual(
      digestOfRecoveryCode(code),
    )
  })

  it.each(["", "123456", "abcd-efgh", "0189-0189-0189-0189-0189-0189"])("are not %j", (typed) => {
    expect(digestOfRecoveryCode(typed)).toBeUndefined()
  })
})
