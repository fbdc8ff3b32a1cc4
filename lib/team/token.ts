import { createHash, randomBytes } from "node:crypto"

/**
 * The secret of an invitation's link: 256 bits, of which the digest is kept. It begins with its account, so that it is
 * looked up inside that account like everything else.
 */
export function newToken(account_id: string): string {
  return `${account_id}.${randomBytes(32).toString("base64url")}`
}

/** The account that a link names; undefined when it is none of ours. */
export function accountOf(token: string): string | undefined {
  return /^(acct_[0-9a-z]{26})\.[A-Za-z0-9_-]{43}$/.exec(token)?.[1]
}

export function digestOf(token: string): Buffer {
  return createHash("sha256").update(token).digest()
}
