import { randomBytes } from "node:crypto"

const ALPHABET = "ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789"

/** `prefix_` and 24 random letters and digits. */
export function newId(prefix: string): string {
  return `${prefix}_${[...randomBytes(24)].map((byte) => ALPHABET[byte % ALPHABET.length]).join("")}`
}
