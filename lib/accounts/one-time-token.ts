import { createHash, randomBytes } from "node:crypto"
import type { Schema, Trx } from "@/db"

export type Purpose = Schema["one_time_token"]["purpose"]

// @source PLATFORM 5.5
const validFor_min: Record<Purpose, number> = {
  verify_email: 24 * 60,
  reset_password: 30,
  sign_in: 30,
}

export interface NewToken {
  readonly purpose: Purpose
  readonly email: string
  readonly payload?: Readonly<Record<string, unknown>>
  readonly now: Date
}

/**
 * A new single-use token of 256 bits, of which the digest is kept. An earlier one of the same purpose for the same
 * address is void.
 */
export async function mintToken(trx: Trx, { purpose, email, payload, now }: NewToken): Promise<string> {
  await trx
    .updateTable("one_time_token")
    .set({ used_at: now })
    .where("email", "=", email)
    .where("purpose", "=", purpose)
    .where("used_at", "is", null)
    .execute()
  const token = randomBytes(32).toString("base64url")
  await trx
    .insertInto("one_time_token")
    .values({
      digest: digestOf(token),
      purpose,
      email,
      payload: JSON.stringify(payload ?? {}),
      created_at: now,
      expires_at: new Date(now.getTime() + validFor_min[purpose] * 60_000),
      used_at: null,
    })
    .execute()
  return token
}

export interface TokenContent {
  readonly email: string
  readonly payload: Record<string, unknown>
}

/** Uses a token up and says what it stood for; undefined when it is unknown, used or too old. */
export async function consumeToken(
  trx: Trx,
  { purpose, token, now }: { purpose: Purpose; token: string; now: Date },
): Promise<TokenContent | undefined> {
  return trx
    .updateTable("one_time_token")
    .set({ used_at: now })
    .where("digest", "=", digestOf(token))
    .where("purpose", "=", purpose)
    .where("used_at", "is", null)
    .where("expires_at", ">", now)
    .returning(["email", "payload"])
    .executeTakeFirst()
}

/** What a token stands for, without using it up. */
export async function peekToken(
  trx: Trx,
  { purpose, token, now }: { purpose: Purpose; token: string; now: Date },
): Promise<TokenContent | undefined> {
  return trx
    .selectFrom("one_time_token")
    .select(["email", "payload"])
    .where("digest", "=", digestOf(token))
    .where("purpose", "=", purpose)
    .where("used_at", "is", null)
    .where("expires_at", ">", now)
    .executeTakeFirst()
}

function digestOf(token: string): Buffer {
  return createHash("sha256").update(token).digest()
}
