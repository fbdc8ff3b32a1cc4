import { withoutTenant } from "@/db"
import { TarnwrightError } from "@/lib/errors"
import type { Self } from "./second-factor"
import { endSessionsOf, idleSince } from "./session"

/** A session of a person, as they see it. */
export interface OwnSession {
  readonly id: string
  readonly created_at: Date
  readonly last_seen_at: Date
  /** Network address from which it was opened. */
  readonly ip: string | null
  readonly user_agent: string | null
  readonly is_this: boolean
}

/** The sessions of a person that are alive, the one seen last first. */
export async function listOwnSessions({
  visitor,
  person,
  session_id,
}: Omit<Self, "input">): Promise<OwnSession[]> {
  const rows = await withoutTenant((trx) =>
    trx
      .selectFrom("session")
      .select(["id", "created_at", "last_seen_at", "ip", "user_agent"])
      .where("user_id", "=", person.id)
      .where("expires_at", ">", visitor.now)
      .where("last_seen_at", ">", idleSince(visitor.now))
      .orderBy("last_seen_at", "desc")
      .execute(),
  )
  return rows.map((row) => ({ ...row, is_this: row.id === session_id }))
}

/** Ends one session of a person: its cookie is worth nothing from now on. @throws TarnwrightError `not_found`. */
export async function endOwnSession({ person, input }: Self<{ readonly ended_id: string }>): Promise<void> {
  const { numDeletedRows } = await withoutTenant((trx) =>
    trx
      .deleteFrom("session")
      .where("id", "=", input.ended_id)
      .where("user_id", "=", person.id)
      .executeTakeFirst(),
  )
  if (numDeletedRows !== 1n) throw new TarnwrightError("not_found", "This session has ended already.")
}

/** Ends every session of a person but the one in which they ask. */
export async function endOtherSessions({ person, session_id }: Omit<Self, "input">): Promise<void> {
  await withoutTenant((trx) => endSessionsOf(trx, person.id, { session_id }))
}
