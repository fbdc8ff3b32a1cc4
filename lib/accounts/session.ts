import { createHash, randomBytes } from "node:crypto"
import { type Trx, withoutTenant } from "@/db"
import { newId } from "@/lib/id"
import type { Person, Visitor } from "./person"

// @source PLATFORM 5.2: idle 12 h, absolute 30 d, for the platform's own people 12 h
export const SESSION_DAYS = 30
const longest_h = SESSION_DAYS * 24
const longestForAdmin_h = 12
const idle_h = 12
const seenEvery_ms = 60_000
const shape = /^[A-Za-z0-9_-]{43}$/

/** A person's session as their browser holds it: `token` is the secret of the cookie and is kept nowhere else. */
export interface OpenedSession {
  readonly token: string
  readonly person: Person
}

/**
 * Opens a session under a new random id. Whoever has just shown a password or a code is fresh, and need not confirm
 * for a while that it is them; a link alone does not show it.
 */
export async function openSession(
  trx: Trx,
  visitor: Visitor,
  person: Person,
  { fresh }: { fresh: boolean } = { fresh: true },
): Promise<OpenedSession> {
  const token = randomBytes(32).toString("base64url")
  const hours = person.is_admin ? longestForAdmin_h : longest_h
  await trx
    .insertInto("session")
    .values({
      token_digest: digestOf(token),
      id: newId("session"),
      user_id: person.id,
      created_at: visitor.now,
      last_seen_at: visitor.now,
      expires_at: new Date(visitor.now.getTime() + hours * 3_600_000),
      stepped_up_at: fresh ? visitor.now : null,
      ip: visitor.ip ?? null,
      user_agent: visitor.user_agent?.slice(0, 300) ?? null,
    })
    .execute()
  return { token, person }
}

export interface ReadSession {
  readonly session_id: string
  readonly person: Person
  /** When the person last showed a password or a code in this session. */
  readonly stepped_up_at: Date | null
  /** Whether the person has set a second factor up; then this session was opened with it. */
  readonly second_factor: boolean
}

/** Whose session a cookie stands for; undefined when it was ended, is too old, or never was. */
export async function readSession(token: string | undefined, now: Date): Promise<ReadSession | undefined> {
  if (!token || !shape.test(token)) return undefined
  return withoutTenant(async (trx) => {
    const found = await trx
      .selectFrom("session")
      .innerJoin("app_user", "app_user.id", "session.user_id")
      .leftJoin("second_factor", (join) =>
        join
          .onRef("second_factor.user_id", "=", "session.user_id")
          .on("second_factor.confirmed_at", "is not", null),
      )
      .select([
        "session.id as session_id",
        "session.last_seen_at",
        "session.stepped_up_at",
        "second_factor.confirmed_at as second_factor_at",
        "app_user.id",
        "app_user.email",
        "app_user.name",
        "app_user.is_admin",
      ])
      .where("session.token_digest", "=", digestOf(token))
      .where("session.expires_at", ">", now)
      .where("session.last_seen_at", ">", idleSince(now))
      .executeTakeFirst()
    if (!found) return undefined
    if (now.getTime() - found.last_seen_at.getTime() > seenEvery_ms) {
      await trx
        .updateTable("session")
        .set({ last_seen_at: now })
        .where("token_digest", "=", digestOf(token))
        .execute()
    }
    const { session_id, stepped_up_at, id, email, name, is_admin } = found
    return {
      session_id,
      person: { id, email, name, is_admin },
      stepped_up_at,
      second_factor: found.second_factor_at !== null,
    }
  })
}

/** Whatever was seen last before this is dead by idleness. */
export function idleSince(now: Date): Date {
  return new Date(now.getTime() - idle_h * 3_600_000)
}

/** Ends one session: its cookie is worth nothing from now on. */
export async function endSession(token: string): Promise<void> {
  await withoutTenant((trx) =>
    trx.deleteFrom("session").where("token_digest", "=", digestOf(token)).execute(),
  )
}

/** Ends every session of a person, but for the one in which they act, if they do. */
export async function endSessionsOf(trx: Trx, user_id: string, but?: { session_id: string }): Promise<void> {
  await trx
    .deleteFrom("session")
    .where("user_id", "=", user_id)
    .where("id", "!=", but?.session_id ?? "")
    .execute()
}

function digestOf(token: string): Buffer {
  return createHash("sha256").update(token).digest()
}
