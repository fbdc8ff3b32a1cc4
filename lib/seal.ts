import { createCipheriv, createDecipheriv, randomBytes } from "node:crypto"
import { env } from "@/lib/env"

const nonceBytes = 12
const tagBytes = 16

/**
 * Encrypts a secret for rest: AES-256-GCM under `ENCRYPTION_KEY`, as nonce, tag and text in a row.
 *
 * `place` says where it is kept, as `webhook_endpoint:hook_…`: moved to another place it does not open.
 *
 * @source NIST SP 800-38D, section 8.2.2: a random 96-bit nonce for each text.
 */
export function seal(secret: string, place: string): Buffer {
  const nonce = randomBytes(nonceBytes)
  const cipher = createCipheriv("aes-256-gcm", key(), nonce, { authTagLength: tagBytes })
  cipher.setAAD(Buffer.from(place))
  const text = Buffer.concat([cipher.update(secret, "utf8"), cipher.final()])
  return Buffer.concat([nonce, cipher.getAuthTag(), text])
}

/**
 * The secret that was sealed for this place.
 *
 * @throws Error when it was changed, sealed for another place, or sealed under another key.
 */
export function unseal(sealed: Buffer, place: string): string {
  const nonce = sealed.subarray(0, nonceBytes)
  const decipher = createDecipheriv("aes-256-gcm", key(), nonce, { authTagLength: tagBytes })
  decipher.setAAD(Buffer.from(place))
  decipher.setAuthTag(sealed.subarray(nonceBytes, nonceBytes + tagBytes))
  return decipher.update(sealed.subarray(nonceBytes + tagBytes), undefined, "utf8") + decipher.final("utf8")
}

function key(): Buffer {
  return Buffer.from(env().ENCRYPTION_KEY, "base64")
}
