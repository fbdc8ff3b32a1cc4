import { createHash } from "node:crypto"
import { Secret } from "otpauth"

// @source PLATFORM 5.7: ten, of 112 bits at least, so that a plain digest is enough
const count = 10
const size_bytes = 15

/** New recovery codes, in groups of four as they are written down. */
export function newRecoveryCodes(): string[] {
  return Array.from({ length: count }, () =>
    new Secret({ size: size_bytes }).base32.toLowerCase().replace(/(.{4})(?=.)/g, "$1-"),
  )
}

/** The digest of what may be a recovery code, however it was typed; undefined when its form says that it is none. */
export function digestOfRecoveryCode(typed: string): Buffer | undefined {
  const plain = typed.replace(/[\s-]/g, "").toUpperCase()
  return /^[A-Z2-7]{24}$/.test(plain) ? createHash("sha256").update(plain).digest() : undefined
}
