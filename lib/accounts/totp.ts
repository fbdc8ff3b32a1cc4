import { Secret, TOTP } from "otpauth"

// @source RFC 6238, sections 4 and 5.2: SHA-1, six digits, 30 s, one step of tolerance either way
const form = { algorithm: "SHA1", digits: 6, period: 30 } as const
const window = 1

/** A new seed of 160 bits, in base32 as an authenticator app takes it. */
export function newSeed(): string {
  return new Secret({ size: 20 }).base32
}

/** The address that an authenticator app reads from a QR code. */
export function totpUri(seed: string, email: string): string {
  return totpOf(seed, email).toString()
}

/** The time step whose code this is, near `now`; undefined when it is the code of none. */
export function stepOf(seed: string, code: string, now: Date): number | undefined {
  const timestamp = now.getTime()
  const delta = totpOf(seed).validate({ token: code, timestamp, window })
  return delta === null ? undefined : TOTP.counter({ ...form, timestamp }) + delta
}

function totpOf(seed: string, label?: string): TOTP {
  return new TOTP({ ...form, issuer: "Tarnwright", label, secret: Secret.fromBase32(seed) })
}
