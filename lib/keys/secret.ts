import { createHmac, randomBytes } from "node:crypto"
import { crc32 } from "node:zlib"
import type { KeyKind, KeyMode } from "@/db"
import { env } from "@/lib/env"

// @source PLATFORM 2.1: 32 random bytes in base62, then a CRC-32 over all that stands before it, so that a scanner
// tells a real key from a stray and the API refuses a typing error without a query.
const alphabet = "0123456789ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz"
const secretLength = 43
const checksumLength = 6
const shape = /^tarn_(server|browser)_(live|sandbox)_[0-9A-Za-z]{49}$/

/** A new key. It exists only in the answer that shows it: what is kept is its digest. */
export function newSecret(kind: KeyKind, mode: KeyMode): string {
  const random = base62(BigInt(`0x${randomBytes(32).toString("hex")}`), secretLength)
  const body = `tarn_${kind}_${mode}_${random}`
  return body + checksumOf(body)
}

/** Whether the text can be a key of ours: right shape, right checksum. */
export function isWellFormed(secret: string): boolean {
  return shape.test(secret) && checksumOf(secret.slice(0, -checksumLength)) === secret.slice(-checksumLength)
}

export interface Digest {
  readonly digest: Buffer
  readonly pepper_version: number
}

/**
 * Digest under the newest pepper, under which a new key is stored.
 *
 * HMAC and not a slow hash: the secret has 256 random bits, and a slow hash on the path of every unauthenticated call
 * would be a way to exhaust the server. @source NIST SP 800-63B-4, look-up secrets; PLATFORM 2.2, 2.3
 */
export function digestOf(secret: string): Digest {
  return digestsOf(secret)[0] as Digest
}

/** Digests under every pepper in force, newest first. */
export function digestsOf(secret: string): Digest[] {
  return peppers().map(({ version, pepper }) => ({
    digest: createHmac("sha256", pepper).update(secret).digest(),
    pepper_version: version,
  }))
}

let parsedPeppers: { version: number; pepper: string }[] | undefined

function peppers() {
  parsedPeppers ??= env()
    .KEY_PEPPERS.split(",")
    .map((pair) => {
      const colon = pair.indexOf(":")
      return { version: Number(pair.slice(0, colon)), pepper: pair.slice(colon + 1) }
    })
  return parsedPeppers
}

function checksumOf(text: string): string {
  return base62(BigInt(crc32(text)), checksumLength)
}

function base62(value: bigint, length: number): string {
  let text = ""
  for (let rest = value; text.length < length; rest /= 62n) text = alphabet[Number(rest % 62n)] + text
  return text
}
