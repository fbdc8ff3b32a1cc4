import { crc32 } from "node:zlib"
import { beforeAll, describe, expect, it } from "vitest"
import { digestOf, digestsOf, isWellFormed, newSecret } from "@/lib/keys/secret"

const alphabet = "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz"

beforeAll(() => {
  Object.assign(process.env, {
    PUBLIC_URL: "http://127.0.0.1:1",
    DATABASE_URL: "postgres://nobody@127.0.0.1:1/none",
    DATABASE_WORKER_URL: "postgres://nobody@127.0.0.1:1/none",
    DATABASE_ADMIN_URL: "postgres://nobody@127.0.0.1:1/none",
    KEY_PEPPERS: `2:${"n".repeat(40)},1:${"o".repeat(40)}`,
    NEXTAUTH_SECRET: "s".repeat(40),
    ENCRYPTION_KEY: Buffer.alloc(32, 1).toString("base64"),
    WIDGET_SIGNING_KEY: "{}",
    SMTP_URL: "smtp://127.0.0.1:1",
    STRIPE_SECRET_KEY: "sk",
    STRIPE_WEBHOOK_SECRET: "whsec",
  })
})

describe("a key", () => {
  it("says its kind and mode, then 43 random characters and 6 of checksum", () => {
    expect(newSecret("server", "live")).toMatch(/^tarn_server_live_[0-9A-Za-z]{49}$/)
    expect(newSecret("browser", "sandbox")).toMatch(/^tarn_browser_sandbox_[0-9A-Za-z]{49}$/)
  })

  it("ends in the CRC-32 of all that stands before, which is that of zlib, PNG and Ethernet", () => {
    // The check value that the catalogues of CRC algorithms give for CRC-32/ISO-HDLC.
    expect(crc32("123456789")).toBe(0xcbf43926)
    const secret = newSecret("server", "live")
    const checksum = [...secret.slice(-6)].reduce((sum, digit) => sum * 62 + alphabet.indexOf(digit), 0)
    expect(checksum).toBe(crc32(secret.slice(0, -6)))
  })

  it("never comes twice", () => {
    const made = new Set(Array.from({ length: 500 }, () => newSecret("server", "live")))
    expect(made.size).toBe(500)
  })

  it("is recognised whole and refused with any one character changed, missing or added", () => {
    const secret = newSecret("server", "live")
    expect(isWellFormed(secret)).toBe(true)
    for (let index = "tarn_server_live_".length; index < secret.length; index++) {
      const other = secret[index] === "a" ? "b" : "a"
      expect(isWellFormed(secret.slice(0, index) + other + secret.slice(index + 1))).toBe(false)
    }
    expect(isWellFormed(secret.slice(0, -1))).toBe(false)
    expect(isWellFormed(`${secret}a`)).toBe(false)
    expect(isWellFormed(secret.replace("live", "sandbox"))).toBe(false)
    expect(isWellFormed("")).toBe(false)
  })
})

describe("its digest", () => {
  it("is made under the newest pepper and looked for under every one", () => {
    const secret = newSecret("server", "live")
    const digests = digestsOf(secret)
    expect(digests.map(({ pepper_version }) => pepper_version)).toEqual([2, 1])
    expect(digestOf(secret)).toEqual(digests[0])
    expect(digests[0]?.digest.equals(digests[1]?.digest as Buffer)).toBe(false)
    expect(digests[0]?.digest).toHaveLength(32)
  })
})
